import { keyed } from "../keyed.ts";
import type { Quantity } from "../quantity.ts";
import {
  type Comparison,
  type Pattern,
  type RequirementSpec,
  TRACE_SIGNALS,
  type TraceSignal,
} from "../requirement-spec.ts";
import type { Value } from "../table/kind.ts";
import type { COMPARISON, REQUIREMENT_BLOCK, REQUIREMENTS } from "../table/requirement-table.ts";
import { defined } from "./defined.ts";

type Requirement = Value<typeof REQUIREMENT_BLOCK, "whole">;
type ReadComparison = Value<typeof COMPARISON, "whole">;

/** Share of the bound that counts as a margin of 1, when the file does not say: pressures and speeds have a large zero. */
const SCALE_OF_LEVELS = 0.1;

/** Without a scale in the file: 10 % of the bound for pressures and speeds, else the size of the bound; never zero. */
export function usualScale(signal: TraceSignal, bound: number): number {
  const unit = TRACE_SIGNALS[signal];
  const share = unit === "kPa abs" || unit === "rpm" ? SCALE_OF_LEVELS : 1;
  return Math.abs(bound) * share || 1;
}

export function assembleComparison(read: ReadComparison): Comparison {
  const { signal, above, below, scale, span } = read as ReadComparison & {
    readonly above?: Quantity;
    readonly below?: Quantity;
    readonly scale?: Quantity;
  };
  const bound = (above ?? below)?.value ?? 0;
  return {
    signal,
    ...defined({ above: above?.value, below: below?.value }),
    scale: scale?.value ?? usualScale(signal, bound),
    at: span,
  };
}

function patternOf(read: Requirement): Pattern {
  const { stays, overshoot, settles, rises, steadyError, reacts } = read;
  if (stays !== undefined) {
    const condition = stays.while && assembleComparison(stays.while);
    return { kind: "stays", holds: assembleComparison(stays), ...defined({ condition }) };
  }
  if (overshoot !== undefined) return { kind: "overshoot", of: overshoot.of, atMost: overshoot.atMost.value };
  if (settles !== undefined)
    return { kind: "settles", band: settles.band.value, within: settles.within.value, after: settles.after };
  if (rises !== undefined)
    return { kind: "rises", fraction: rises.fraction.value, within: rises.within.value };
  if (steadyError !== undefined)
    return { kind: "steady_error", atMost: steadyError.atMost.value, over: steadyError.over.value };
  if (reacts === undefined) throw new Error("a requirement without a pattern passed the reader");
  return {
    kind: "reacts",
    when: assembleComparison(reacts.when),
    ...keyed("then", assembleComparison(reacts.then)),
    within: reacts.within.value,
    lasting: reacts.lasting.value,
  };
}

/** Patterns about reaching a target say nothing where the plant cannot reach it. */
const NEEDS_REACHABLE: readonly Pattern["kind"][] = ["overshoot", "settles", "rises", "steady_error"];

export function assembleRequirements(read: Value<typeof REQUIREMENTS, "whole">): readonly RequirementSpec[] {
  return read.map((each) => {
    const pattern = patternOf(each);
    return {
      id: each.id,
      says: each.says,
      scenarios: (each.scenarios ?? []).map(({ name }) => name),
      pattern,
      onlyIfReachable: each.onlyIfReachable ?? NEEDS_REACHABLE.includes(pattern.kind),
      at: each.span,
    };
  });
}
