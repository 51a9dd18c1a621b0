import { assert, integer, property } from "fast-check";
import { describe, expect, it } from "vitest";
import { clopperPearsonLower, clopperPearsonUpper, violationUpper95 } from "../../verification/statistics.ts";

const counts = () =>
  integer({ min: 1, max: 3000 }).chain((n) => integer({ min: 0, max: n }).map((k) => ({ k, n })));

/** P(X <= k) of the binomial distribution, summed term by term in logarithms: the definition the bound must satisfy. */
function binomialCdf(k: number, n: number, p: number): number {
  let term = n * Math.log1p(-p);
  let sum = Math.exp(term);
  for (let i = 1; i <= k; i++) {
    term += Math.log((n - i + 1) / i) + Math.log(p) - Math.log1p(-p);
    sum += Math.exp(term);
  }
  return sum;
}

describe("Clopper-Pearson bound", () => {
  it("is the probability at which so few violations would be seen with 5 % (the exact test's definition)", () => {
    assert(
      property(counts(), ({ k, n }) => {
        if (k === n) return clopperPearsonUpper(k, n, 0.05) === 1;
        return Math.abs(binomialCdf(k, n, clopperPearsonUpper(k, n, 0.05)) - 0.05) < 1e-6;
      }),
      { seed: 1 },
    );
  });

  it("agrees with the example in the documentation of SciPy's binomtest: 7 of 50, two-sided 95 %", () => {
    expect(clopperPearsonLower(7, 50, 0.025)).toBeCloseTo(0.05819170033997342, 9);
    expect(clopperPearsonUpper(7, 50, 0.025)).toBeCloseTo(0.26739600249700846, 9);
  });

  it.each([
    [1, 100, 0.00025315, 0.05445939],
    [5, 100, 0.01643188, 0.11283491],
  ])("gives %i of %i between %f and %f (recomputed with SciPy)", (k, n, low, high) => {
    expect(clopperPearsonLower(k, n, 0.025)).toBeCloseTo(low, 8);
    expect(clopperPearsonUpper(k, n, 0.025)).toBeCloseTo(high, 8);
  });

  it.each([10, 30, 59, 100, 300, 1000, 1500])("is 1 - alpha^(1/n) when %i runs show no violation", (n) => {
    expect(clopperPearsonUpper(0, n, 0.05)).toBeCloseTo(1 - 0.05 ** (1 / n), 10);
    expect(clopperPearsonUpper(0, n, 0.025)).toBeCloseTo(1 - 0.025 ** (1 / n), 10);
  });

  it("needs 59 runs without a violation for 5 %, 299 for 1 %, 2995 for 0.1 % (recomputed)", () => {
    for (const [n, p] of [
      [59, 0.05],
      [299, 0.01],
      [2995, 0.001],
    ] as const) {
      expect(clopperPearsonUpper(0, n, 0.05)).toBeLessThanOrEqual(p);
      expect(clopperPearsonUpper(0, n - 1, 0.05)).toBeGreaterThan(p);
    }
  });
});

describe("the bound stated in evidence", () => {
  it("never understates, and has six significant digits", () => {
    assert(
      property(counts(), ({ k, n }) => {
        const exact = clopperPearsonUpper(k, n, 0.05);
        const stated = violationUpper95(k, n);
        return stated >= exact && stated - exact <= 1e-5 * exact && Number(stated.toPrecision(6)) === stated;
      }),
      { seed: 2 },
    );
  });

  it("is 0.00299125 for 1000 runs without a violation (1 - 0.05^(1/1000) = 0.0029912495...)", () => {
    expect(violationUpper95(0, 1000)).toBe(0.00299125);
  });

  it("is 1 when nothing was exercised or everything violated", () => {
    expect(violationUpper95(0, 0)).toBe(1);
    expect(violationUpper95(4, 4)).toBe(1);
  });
});
