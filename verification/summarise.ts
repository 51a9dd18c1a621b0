import type { MarginDistribution, Verdict } from "./evidence.ts";

/** Margins of a requirement over runs, one each; NaN where the run did not exercise it. */
export interface MarginSummary {
  readonly verdict: Verdict;
  readonly runs: number;
  readonly exercised: number;
  readonly violations: number;
  /** The first run with the least margin; absent when nothing was exercised. */
  readonly worst?: { readonly run: number; readonly margin: number };
  readonly margins?: MarginDistribution;
}

export function summarise(margins: Float64Array): MarginSummary {
  const exercised = margins.filter((margin) => !Number.isNaN(margin)).sort();
  const violations = exercised.filter((margin) => margin < 0).length;
  const counts = { runs: margins.length, exercised: exercised.length, violations };
  if (exercised.length === 0) return { verdict: "not_exercised", ...counts };
  const least = exercised[0];
  return {
    verdict: violations > 0 ? "violated" : "holds",
    ...counts,
    worst: { run: margins.indexOf(least), margin: least },
    margins: distribution(exercised),
  };
}

/** Nearest-rank quantiles and a histogram from -1 to 1, margins outside in the end bins. `sorted` is not empty. */
function distribution(sorted: Float64Array): MarginDistribution {
  const rank = (ratio: number) => sorted[Math.max(0, Math.ceil(ratio * sorted.length) - 1)];
  const counts = new Array<number>(BINS).fill(0);
  for (const margin of sorted) {
    const bin = Math.floor(((margin - LOW) / (HIGH - LOW)) * BINS);
    counts[Math.min(Math.max(bin, 0), BINS - 1)]++;
  }
  return {
    quantiles: { least: rank(0), p05: rank(0.05), median: rank(0.5), p95: rank(0.95), most: rank(1) },
    histogram: { low: LOW, high: HIGH, counts },
  };
}

const BINS = 40;
const LOW = -1;
const HIGH = 1;
