import { agreementShard } from "./shard.ts";

agreementShard(3, 50);
