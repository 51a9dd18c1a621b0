import type { Trace } from "../../hil-sim/trace.ts";
import type { Comparison, Pattern, TraceSignal } from "../../spec/requirement-spec.ts";
import type { Span } from "../../spec/span.ts";

export const NOWHERE: Span = { file: "test.yaml", line: 1, column: 1, endLine: 1, endColumn: 2 };

/** A trace of given samples; a function is sampled over time in seconds. */
export function traceOf(
  step: number,
  length: number,
  signals: Partial<Record<TraceSignal, readonly number[] | ((seconds: number) => number)>>,
): Trace {
  const recorded: Partial<Record<TraceSignal, Float64Array>> = {};
  for (const [name, source] of Object.entries(signals)) {
    recorded[name as TraceSignal] = Float64Array.from({ length }, (_, k) =>
      typeof source === "function" ? source(k * step) : source[k],
    );
  }
  return { step, length, signals: recorded };
}

export function comparison(
  signal: TraceSignal,
  bounds: { above?: number; below?: number; scale?: number },
): Comparison {
  return { scale: 1, ...bounds, signal, at: NOWHERE };
}

export function reaction(when: Comparison, then: Comparison, within: number, lasting: number) {
  const pattern: Extract<Pattern, { kind: "reacts" }> = { kind: "reacts", when, then, within, lasting };
  return pattern;
}

/** Step response of wn^2 / (s^2 + 2 z wn s + wn^2), z < 1: the closed formula of any control textbook. */
export function secondOrderStep(damping: number, naturalFrequency: number): (seconds: number) => number {
  const root = Math.sqrt(1 - damping * damping);
  return (seconds) => {
    if (seconds < 0) return 0;
    const phase = naturalFrequency * root * seconds;
    const decay = Math.exp(-damping * naturalFrequency * seconds);
    return 1 - decay * (Math.cos(phase) + (damping / root) * Math.sin(phase));
  };
}

/** One step of the wanted boost from 100 to 200 kPa at 1 s, and a boost that answers with `response` (0 to 1). */
export function stepTrace(response: (seconds: number) => number, length: number, step = 0.001): Trace {
  return traceOf(step, length, {
    boost_wanted: (seconds) => (seconds < 1 - step / 2 ? 100 : 200),
    boost_pressure: (seconds) => 100 + 100 * response(seconds - 1),
  });
}
