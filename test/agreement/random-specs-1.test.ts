import { agreementShard } from "./shard.ts";

agreementShard(1, 50);
