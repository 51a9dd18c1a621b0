import type { TraceSignal } from "../spec/index.ts";
import { wholeMilliseconds } from "./milliseconds.ts";

/** One sample each millisecond, sample 0 at time zero; arrays are reused from run to run and may be longer than `length`. */
export interface Trace {
  /** Seconds between samples. */
  readonly step: number;
  length: number;
  /** Base units of TRACE_SIGNALS; flags are 0 or 1. Only the signals asked for at creation are present. */
  readonly signals: Partial<Record<TraceSignal, Float64Array>>;
  /** Index into MODES, if asked for. */
  readonly mode?: Uint8Array;
}

/** Memory for runs of up to `seconds`, of the named signals only. */
export function newTrace(signals: readonly TraceSignal[], seconds: number, withMode = false): Trace {
  const samples = wholeMilliseconds(seconds) + 1;
  const arrays: Trace["signals"] = {};
  for (const signal of signals) arrays[signal] = new Float64Array(samples);
  const trace = { step: 1e-3, length: 0, signals: arrays };
  return withMode ? { ...trace, mode: new Uint8Array(samples) } : trace;
}

/** Samples that fit. */
export function traceCapacity(trace: Trace): number {
  let least = trace.mode?.length ?? Number.MAX_SAFE_INTEGER;
  for (const samples of Object.values(trace.signals)) least = Math.min(least, samples.length);
  return least;
}
