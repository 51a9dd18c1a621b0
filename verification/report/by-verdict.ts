import type { Evidence, RequirementResult, Verdict } from "../evidence.ts";

/** A result and its place in the evidence, from which its id on the page is made. */
export interface Placed {
  readonly result: RequirementResult;
  readonly index: number;
}

const ORDER: readonly Verdict[] = ["violated", "not_exercised", "holds"];

/** What is violated first, then what nobody knows, then the rest; otherwise in the order of the spec. */
export function byVerdict(evidence: Evidence): Placed[] {
  return evidence.requirements
    .map((result, index) => ({ result, index }))
    .sort((a, b) => ORDER.indexOf(a.result.verdict) - ORDER.indexOf(b.result.verdict));
}
