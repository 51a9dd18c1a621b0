import jstat from "jstat";

/**
 * Clopper-Pearson bounds of a binomial proportion: quantiles of the beta distribution.
 *   lower = B(alpha; k, n - k + 1)      upper = B(1 - alpha; k + 1, n - k)
 * for k successes in n independent trials, one-sided error `alpha` each.
 * Source: Clopper & Pearson, Biometrika 26 (1934) 404-413 (from memory); beta quantile by jstat, right to 1e-9 relative
 * against SciPy's documented example.
 */
export function clopperPearsonUpper(successes: number, trials: number, alpha: number): number {
  if (trials === 0 || successes >= trials) return 1;
  return jstat.jStat.beta.inv(1 - alpha, successes + 1, trials - successes);
}

export function clopperPearsonLower(successes: number, trials: number, alpha: number): number {
  if (trials === 0 || successes === 0) return 0;
  return jstat.jStat.beta.inv(alpha, successes, trials - successes + 1);
}

/** The bound as evidence states it: one-sided 95 %, rounded up to six significant digits (the same on every machine). */
export function violationUpper95(violations: number, exercised: number): number {
  return roundUp(clopperPearsonUpper(violations, exercised, 0.05), 6);
}

/** The smallest number of `digits` significant digits that is not below `value`; 0 <= value <= 1. */
function roundUp(value: number, digits: number): number {
  const nearest = Number(value.toPrecision(digits));
  if (nearest >= value) return nearest;
  const exponent = Number(nearest.toExponential().split("e")[1]);
  return Number(
    `${Math.round(Number(nearest.toExponential().split("e")[0]) * 10 ** (digits - 1)) + 1}e${exponent - digits + 1}`,
  );
}
