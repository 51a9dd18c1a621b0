import type { TraceSignal } from "../../../spec/index.ts";
import type { Limits } from "../../evidence.ts";

/** One run over time, whoever made it: a worst run of the evidence, a simulation, a replay. */
export interface TracePlot {
  /** Unique on its page; letters, digits and hyphens. */
  readonly id: string;
  readonly title: string;
  /** Seconds between samples; sample 0 at time zero. */
  readonly stepS: number;
  /** Samples to show; the arrays may be longer. */
  readonly length: number;
  /** Base units of TRACE_SIGNALS; what is missing is not drawn. */
  readonly signals: Partial<Readonly<Record<TraceSignal, ArrayLike<number>>>>;
  /** Index into MODES. */
  readonly mode?: ArrayLike<number>;
  readonly limits?: Partial<Limits>;
}
