import { agreementShard } from "./shard.ts";

agreementShard(4, 50);
