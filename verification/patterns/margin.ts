import type { Comparison } from "../../spec/index.ts";

/**
 * The least margin of the target patterns: worse is not told apart, so that one absurd run does not hide the others.
 * Also what a margin that is not a number becomes. `stays` and `reacts`, distances in units of `scale`, have no least.
 */
export const WORST_MARGIN = -3;

/** At least WORST_MARGIN; NaN, which no requirement may be satisfied by, becomes WORST_MARGIN. */
export function clipped(margin: number): number {
  return Number.isNaN(margin) ? WORST_MARGIN : Math.max(margin, WORST_MARGIN);
}

/** Signed distance of `value` to the nearer bound, in units of the comparison's scale; NaN for NaN. */
export function comparisonMargin(comparison: Comparison, value: number): number {
  const above = comparison.above === undefined ? Infinity : value - comparison.above;
  const below = comparison.below === undefined ? Infinity : comparison.below - value;
  return Math.min(above, below) / comparison.scale;
}

/** Whether the comparison is true: bounds included, false for NaN. */
export function isTrue(comparison: Comparison, value: number): boolean {
  return comparisonMargin(comparison, value) >= 0;
}
