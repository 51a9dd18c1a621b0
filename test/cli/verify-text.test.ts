import { describe, expect, test } from "vitest";
import { requirementLine, violationText } from "../../cli/verify-text.ts";
import { sampleResult } from "../verification/report/sample-evidence.ts";

const worst = (margin: number) => ({ run: 1, margin, values: [] });
const corners = (margin: number, violations: number) => ({
  runs: 20,
  exercised: 20,
  violations,
  worst: worst(margin),
});

describe("the line of a requirement", () => {
  test("violated in corner runs only, it gives the corner's margin and says so", () => {
    const result = sampleResult({ verdict: "violated", worst: worst(0.231), corners: corners(-0.12, 2) });
    expect(requirementLine(result)).toContain(
      "worst margin -0.120 (corner run), violation below 0.30 % (95 %)",
    );
    expect(violationText(result, "a.yaml", ".")).toContain(
      "violated in 0 of 998 random runs and 2 of 20 corner runs of `tip_in`; worst margin -0.120 (corner run)",
    );
  });

  test("a random run that is worse than every corner goes without a word about corners", () => {
    const result = sampleResult({
      verdict: "violated",
      violations: 3,
      worst: worst(-0.5),
      corners: corners(-0.1, 1),
    });
    expect(requirementLine(result)).toContain("worst margin -0.500, violation");
  });

  test("bounds are rounded up to two digits; a bound of 1 is 100 %", () => {
    const below = (bound: number) =>
      /below (.*) %.*%/.exec(requirementLine(sampleResult({ violationProbabilityUpper95: bound })))?.[1];
    // 1 - 0.05^(1/n) for n = 1, 6, 1000 runs without a violation, by hand: 0.95, 0.39304, 0.0029912.
    expect([1, 0.95, 0.39304, 0.0029912].map(below)).toEqual(["100", "95", "40", "0.30"]);
  });

  test("tells how many of the runs exercised it, unless all did", () => {
    expect(requirementLine(sampleResult({ runs: 6, exercised: 4 }))).toMatch(/tip_in +4 of 6 runs, worst/);
    expect(requirementLine(sampleResult({ runs: 6, exercised: 6 }))).toMatch(/tip_in +6 runs, worst/);
  });

  test("not exercised: no margin and no bound but the reason, and the corner runs that did exercise it", () => {
    const silent = sampleResult({ verdict: "not_exercised", exercised: 0, corners: corners(0.4, 0) });
    const line = requirementLine(silent);
    expect(line).toMatch(/^not exercised overshoot_small +tip_in +0 of 1000 runs: boost came within 2.5 %/);
    expect(line).toMatch(/; exercised in 20 of 20 corner runs only$/);
    expect(line).not.toMatch(/margin|violation/);
  });
});
