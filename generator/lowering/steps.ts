import type { Duration } from "../../spec/index.ts";

/** Whole steps that cover a duration: exact division, rounded up; zero stays zero. */
export function stepsIn(duration: Duration, step: Duration): number {
  const numerator = duration.numerator * step.denominator;
  const denominator = duration.denominator * step.numerator;
  return Number((numerator + denominator - 1n) / denominator);
}
