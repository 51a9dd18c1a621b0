import { TRACE_SIGNALS, type TraceSignal } from "../../spec/index.ts";
import { modeName } from "./charts/mode-chart.ts";
import type { TracePlot } from "./charts/trace-plot.ts";
import type { ValueTable } from "./figure.ts";
import { decimals } from "./numbers.ts";

const ROWS = 25;
const DECIMALS: Readonly<Record<string, number>> = { rpm: 0, ratio: 3, flag: 0, "kg/s": 4 };

/** About `count` indices spread evenly over a run, first and last among them. */
export function spreadIndices(length: number, count: number): number[] {
  if (length <= 0) return [];
  const last = length - 1;
  const steps = Math.max(1, Math.min(count - 1, last));
  return [...new Set(Array.from({ length: steps + 1 }, (_, i) => Math.round((i * last) / steps)))];
}

function heading(signal: TraceSignal): string {
  return `${signal.replaceAll("_", " ")}, ${TRACE_SIGNALS[signal]}`;
}

/** The run's values at evenly spread times: what the charts show, in words and figures. */
export function traceTable(trace: TracePlot): ValueTable {
  const signals = (Object.keys(TRACE_SIGNALS) as TraceSignal[]).filter(
    (signal) => trace.signals[signal] !== undefined,
  );
  const cell = (signal: TraceSignal, i: number): string =>
    decimals(trace.signals[signal]?.[i] ?? Number.NaN, DECIMALS[TRACE_SIGNALS[signal]] ?? 1);
  const mode = trace.mode;
  const rows = spreadIndices(trace.length, ROWS).map((i) => [
    decimals(i * trace.stepS, 3),
    ...signals.map((signal) => cell(signal, i)),
    ...(mode === undefined ? [] : [modeName(mode[i])]),
  ]);
  return {
    caption: `${trace.title}: values at evenly spread times`,
    head: ["time, s", ...signals.map(heading), ...(mode === undefined ? [] : ["mode"])],
    rows,
  };
}
