// Entry point of a worker thread: runs batches of one campaign on its own copy of the controller.
import Tinypool from "tinypool";
import { loadController } from "./controllers/load-controller.ts";
import { batchRunner } from "./run-batch.ts";
import type { WorkerStart } from "./worker-pool.ts";

const { loop, controller, seed } = Tinypool.workerData as WorkerStart;

export default batchRunner(loop, await loadController(controller, loop), seed);
