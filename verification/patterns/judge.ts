import type { Trace } from "../../hil-sim/index.ts";
import type { Pattern, TraceSignal } from "../../spec/index.ts";
import type { Command } from "./commands.ts";
import { overshoot } from "./overshoot.ts";
import { reacts } from "./reacts.ts";
import { rises } from "./rises.ts";
import { settles } from "./settles.ts";
import { stays } from "./stays.ts";
import { steadyError } from "./steady-error.ts";

/**
 * The signed margin of a pattern on a trace: 1 comfortable by the whole allowance, 0 the edge, negative violated;
 * undefined when the trace did not exercise it. Target patterns look at `commands` only, so that the caller can leave
 * out those that the plant cannot follow.
 */
export function judge(pattern: Pattern, trace: Trace, commands: readonly Command[]): number | undefined {
  switch (pattern.kind) {
    case "stays":
      return stays(trace, pattern.holds, pattern.condition);
    case "overshoot":
      return overshoot(trace, commands, pattern.of, pattern.atMost);
    case "settles":
      return settles(trace, commands, pattern);
    case "rises":
      return rises(trace, commands, pattern);
    case "steady_error":
      return steadyError(trace, commands, pattern.atMost, pattern.over);
    case "reacts":
      return reacts(trace, pattern);
  }
}

/** The signals a trace must hold for `judge`. */
export function neededSignals(pattern: Pattern): TraceSignal[] {
  switch (pattern.kind) {
    case "stays":
      return [pattern.holds.signal, ...(pattern.condition ? [pattern.condition.signal] : [])];
    case "reacts":
      return [pattern.when.signal, pattern.then.signal];
    default:
      return ["boost_pressure", "boost_wanted"];
  }
}

/** Whether the pattern is about following the wanted boost. */
export function followsTarget(pattern: Pattern): boolean {
  return pattern.kind !== "stays" && pattern.kind !== "reacts";
}
