import type { Trace } from "../../hil-sim/index.ts";
import type { Pattern } from "../../spec/index.ts";
import { comparisonMargin, isTrue, WORST_MARGIN } from "./margin.ts";
import { recorded, samplesIn } from "./recorded.ts";

type Reacts = Extract<Pattern, { kind: "reacts" }>;

/**
 * Each time `when` becomes true (or is true at the start), `then` becomes true within the time and stays so: the
 * quantitative F_[0,within] G_[0,lasting] of `then` at each such sample, closed windows, the least of them.
 *   margin = min over events of max over t in [0, within] of min over s in [t, t + lasting] of then(s)
 * Undefined (not exercised) when `when` never becomes true, or the trace ends before an event could be answered.
 * Source: Donzé & Maler, FORMATS 2010.
 */
export function reacts(trace: Trace, pattern: Reacts): number | undefined {
  const signal = recorded(trace, pattern.when.signal);
  let least: number | undefined;
  let before = false;
  for (let k = 0; k < trace.length; k++) {
    const now = isTrue(pattern.when, signal[k]);
    if (now && !before) {
      const margin = answered(trace, pattern, k);
      if (margin !== undefined && !(margin >= (least ?? Infinity))) least = margin;
    }
    before = now;
  }
  return least;
}

/** The margin of the answer to one event; undefined when it is late only because the trace ends. */
function answered(trace: Trace, pattern: Reacts, event: number): number | undefined {
  const end = event + samplesIn(trace, pattern.within);
  let best = Number.NEGATIVE_INFINITY;
  for (let start = event; start <= end && start < trace.length; start++) {
    const least = leastIfBetter(trace, pattern, start, best);
    if (least > best) best = least;
  }
  if (best < 0 && end >= trace.length) return undefined;
  return best === Number.NEGATIVE_INFINITY ? WORST_MARGIN : best;
}

/** Least margin of `then` while it must last, given up (minus infinity) as soon as it cannot beat `best`. */
function leastIfBetter(trace: Trace, pattern: Reacts, start: number, best: number): number {
  const signal = recorded(trace, pattern.then.signal);
  const end = Math.min(start + samplesIn(trace, pattern.lasting), trace.length - 1);
  let least = Infinity;
  for (let k = start; k <= end; k++) {
    const margin = comparisonMargin(pattern.then, signal[k]);
    if (!(margin > best)) return Number.NEGATIVE_INFINITY;
    if (margin < least) least = margin;
  }
  return least;
}
