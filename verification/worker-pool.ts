import Tinypool from "tinypool";
import type { LoopSpec } from "../spec/index.ts";
import type { Batch, BatchResult, RunBatch } from "./campaign.ts";
import type { GeneratedController } from "./controllers/load-controller.ts";

/** What a worker needs before its first batch; plain data that a thread can receive. */
export interface WorkerStart {
  readonly loop: LoopSpec;
  readonly controller: GeneratedController;
  readonly seed: number;
}

export interface WorkerPool {
  readonly runBatch: RunBatch;
  /** Ends the threads; batches still waiting are given up. */
  readonly close: () => Promise<void>;
}

/** Threads that run batches side by side; what they give does not depend on their number. */
export function startWorkers(start: WorkerStart, jobs: number): WorkerPool {
  const extension = import.meta.url.endsWith(".ts") ? "ts" : "js";
  const pool = new Tinypool({
    filename: new URL(`./worker.${extension}`, import.meta.url).href,
    workerData: start,
    minThreads: jobs,
    maxThreads: jobs,
    isolateWorkers: false,
  });
  return {
    runBatch: (batch: Batch) => pool.run(batch) as Promise<BatchResult>,
    close: () => pool.destroy(),
  };
}
