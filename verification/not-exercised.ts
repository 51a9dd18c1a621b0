import type { Pattern } from "../spec/index.ts";
import type { RequirementResult } from "./evidence.ts";

/** One result of each requirement for which none of its results is known, in the order of the results. */
function without(
  results: readonly RequirementResult[],
  isKnown: (result: RequirementResult) => boolean,
): RequirementResult[] {
  const known = new Set(results.filter(isKnown).map(({ id }) => id));
  return results.filter(({ id }, i) => !known.has(id) && results.findIndex((other) => other.id === id) === i);
}

/** The requirements that no run, random or corner, exercised in any scenario: nothing is known of them. */
export function neverExercised(results: readonly RequirementResult[]): RequirementResult[] {
  return without(results, ({ exercised, corners }) => exercised + corners.exercised > 0);
}

/** The requirements for which no random run counts, and no corner run violates: not tested, and without a bound. */
export function untested(results: readonly RequirementResult[]): RequirementResult[] {
  return without(results, ({ verdict }) => verdict !== "not_exercised");
}

const COUNTS = "that counts (by default only one that the plant can follow)";

const REASONS: Readonly<Record<Pattern["kind"], string>> = {
  stays: "its `while` was never true",
  reacts: "its `when` never became true, or too late for the answer to be due before the end",
  overshoot: `boost came within 2.5 % of no new target ${COUNTS}`,
  settles: `no new target ${COUNTS} was kept, from the step or from being reached, as long as \`within\``,
  rises: `no higher target ${COUNTS} was kept as long as \`within\``,
  steady_error: `no target ${COUNTS} was kept as long as \`over\``,
};

const isPattern = (kind: string): kind is Pattern["kind"] => Object.hasOwn(REASONS, kind);

/** What a run must have lacked for a pattern not to be exercised by it, in plain words. */
export function whyNotExercised(pattern: string): string {
  return isPattern(pattern) ? REASONS[pattern] : "what it speaks of never came about";
}
