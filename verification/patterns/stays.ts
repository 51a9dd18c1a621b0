import type { Trace } from "../../hil-sim/index.ts";
import type { Comparison } from "../../spec/index.ts";
import { comparisonMargin, isTrue, WORST_MARGIN } from "./margin.ts";
import { recorded } from "./recorded.ts";

/**
 * Least margin of `holds` over all samples at which `condition` is true (always, without one): the quantitative
 * "always" of temporal logic, rho(G phi) = min rho(phi).
 * Undefined (not exercised) when the condition is never true. A signal that is not a number violates.
 * Source: Donzé & Maler, FORMATS 2010.
 */
export function stays(trace: Trace, holds: Comparison, condition?: Comparison): number | undefined {
  const signal = recorded(trace, holds.signal);
  const gate = condition && recorded(trace, condition.signal);
  let least = Infinity;
  for (let k = 0; k < trace.length; k++) {
    if (condition !== undefined && gate !== undefined && !isTrue(condition, gate[k])) continue;
    const margin = comparisonMargin(holds, signal[k]);
    if (Number.isNaN(margin)) return WORST_MARGIN;
    if (margin < least) least = margin;
  }
  return least === Infinity ? undefined : least;
}
