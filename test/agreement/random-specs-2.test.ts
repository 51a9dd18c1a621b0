import { agreementShard } from "./shard.ts";

agreementShard(2, 50);
