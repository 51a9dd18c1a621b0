import type { TraceSignal } from "../spec/requirement-spec.ts";

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
