import { spawnSync } from "node:child_process";
import fc from "fast-check";
import { expect, test } from "vitest";
import { clopperPearsonLower, clopperPearsonUpper } from "../../verification/index.ts";
import { cannotUse, pythonWithScipy } from "../support/tool.ts";

// Outside reference: scipy.stats.beta.ppf, the quantile by which Clopper and Pearson's bounds are defined.
const PROGRAM = `
import json, sys
from scipy.stats import beta
cases = json.load(sys.stdin)
print(json.dumps([[
    0.0 if k == 0 else float(beta.ppf(a, k, n - k + 1)),
    1.0 if k == n else float(beta.ppf(1 - a, k + 1, n - k)),
] for k, n, a in cases]))
`;

const trial = fc
  .tuple(
    fc.integer({ min: 1, max: 5000 }),
    fc.double({ min: 0, max: 1, noNaN: true }),
    fc.constantFrom(0.05, 0.025, 0.01),
  )
  .map(([n, share, alpha]) => [Math.round(share * n), n, alpha] as const);

test.skipIf(cannotUse("scipy"))("the bounds on a probability are SciPy's for 200 random counts", () => {
  const cases = fc.sample(trial, { seed: 7, numRuns: 200 });
  const run = spawnSync(pythonWithScipy() as string, ["-c", PROGRAM], {
    input: JSON.stringify(cases),
    encoding: "utf8",
  });
  const expected: [number, number][] = JSON.parse(run.stdout);
  expect(expected).toHaveLength(cases.length);
  cases.forEach(([k, n, alpha], i) => {
    expect(clopperPearsonLower(k, n, alpha)).toBeCloseTo(expected[i][0], 8);
    expect(clopperPearsonUpper(k, n, alpha)).toBeCloseTo(expected[i][1], 8);
  });
});
