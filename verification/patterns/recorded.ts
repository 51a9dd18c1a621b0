import type { Trace } from "../../hil-sim/index.ts";
import type { TraceSignal } from "../../spec/index.ts";

/**
 * The samples of one signal of a trace.
 * @throws when the trace was recorded without it: a fault of the caller, who asks `neededSignals` first.
 */
export function recorded(trace: Trace, signal: TraceSignal): Float64Array {
  const samples = trace.signals[signal];
  if (samples === undefined) throw new Error(`the trace was recorded without ${signal}`);
  return samples;
}

/** Whole samples in `seconds`; window ends round to the nearest tick. */
export function samplesIn(trace: Trace, seconds: number): number {
  return Math.floor(seconds / trace.step + 0.5);
}
