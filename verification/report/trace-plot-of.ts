import type { Trace } from "../../hil-sim/index.ts";
import type { Limits } from "../evidence.ts";
import type { TracePlot } from "./charts/trace-plot.ts";

/** A recorded trace as it stands, ready to draw; its arrays are read, not kept. */
export function tracePlotOf(title: string, trace: Trace, limits: Partial<Limits> = {}): TracePlot {
  const { step, length, signals, mode } = trace;
  return { id: "run", title, stepS: step, length, signals, ...(mode === undefined ? {} : { mode }), limits };
}
