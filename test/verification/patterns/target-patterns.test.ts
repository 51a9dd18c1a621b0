import { assert, double, property } from "fast-check";
import { describe, expect, it } from "vitest";
import { findCommands } from "../../../verification/patterns/commands.ts";
import { overshoot } from "../../../verification/patterns/overshoot.ts";
import { rises } from "../../../verification/patterns/rises.ts";
import { settles } from "../../../verification/patterns/settles.ts";
import { steadyError } from "../../../verification/patterns/steady-error.ts";
import { secondOrderStep, stepTrace, traceOf } from "../traces.ts";

const firstOrderStep = (seconds: number) => (seconds < 0 ? 0 : 1 - Math.exp(-seconds));
const overshootOfStep = (response: (seconds: number) => number) => {
  const trace = stepTrace(response, 21_000);
  const margin = overshoot(trace, findCommands(trace), "step", 1);
  return 1 - (margin ?? Number.NaN);
};
const settlesFrom = (
  response: (seconds: number) => number,
  pattern: { band: number; within: number; after: "command" | "reached" },
  length = 21_000,
) => {
  const trace = stepTrace(response, length);
  return settles(trace, findCommands(trace), { kind: "settles", ...pattern });
};

describe("overshoot", () => {
  // exp(-pi z / sqrt(1 - z^2)): textbook formula; pairs as published and recomputed.
  it.each([
    [0.1, 72.9248],
    [0.2, 52.6621],
    [0.3, 37.2326],
    [0.4, 25.3827],
    [0.5, 16.3034],
    [0.6, 9.478],
    [0.7, 4.5988],
    [Math.SQRT1_2, 4.3214],
    [0.8, 1.5165],
    [0.9, 0.1524],
  ])("of a second-order step with damping %f is %f %%", (damping, percent) => {
    expect(100 * overshootOfStep(secondOrderStep(damping, 5))).toBeCloseTo(percent, 2);
  });

  it("scales: the margin is the part of the allowance left", () => {
    const peak = double({ min: 0, max: 0.2, noNaN: true });
    assert(
      property(peak, (height) => {
        const trace = stepTrace((t) => (t < 1 ? 0 : t < 2 ? 1 + height : 1), 5000);
        const commands = findCommands(trace);
        expect(overshoot(trace, commands, "target", 0.05)).toBeCloseTo((0.05 - height / 2) / 0.05, 9);
        expect(overshoot(trace, commands, "step", 0.1)).toBeCloseTo((0.1 - height) / 0.1, 9);
      }),
      { seed: 8 },
    );
  });

  it("is not exercised by a boost that never comes within 2.5 % of the target", () => {
    expect(overshootOfStep(() => 0.9)).toBeNaN();
    expect(overshootOfStep(() => 0.96)).toBe(0);
  });

  it("after a fall counts only what rises again above the target", () => {
    const wanted = (t: number) => (t < 0.9995 ? 200 : 100);
    const boost = (rebound: number) => (t: number) => (t < 2 ? 200 : t < 3 ? 99 : t < 4 ? rebound : 100);
    const margin = (rebound: number) => {
      const trace = traceOf(0.001, 5000, { boost_wanted: wanted, boost_pressure: boost(rebound) });
      return overshoot(trace, findCommands(trace), "target", 0.05);
    };
    expect(margin(100)).toBe(1);
    expect(margin(105)).toBeCloseTo(0, 9);
    expect(margin(110)).toBeCloseTo(-1, 9);
  });

  it("takes the worst of several commands", () => {
    const wanted = (t: number) => (t < 0.9995 ? 100 : t < 1.9995 ? 150 : 200);
    const boost = (t: number) => (t < 1.5 ? wanted(t) : t < 1.9995 ? 156 : wanted(t));
    const trace = traceOf(0.001, 3000, { boost_wanted: wanted, boost_pressure: boost });
    expect(overshoot(trace, findCommands(trace), "target", 0.05)).toBeCloseTo(0.2, 9);
  });
});

describe("settles", () => {
  // Step metrics recomputed on a fine grid: 1/(s+1) enters 2 % at ln 50 = 3.9120 s; 1/(s^2+s+1) at 8.0763 s.
  // The band is a ratio of the target, 200 kPa, and the step is 100 kPa: 1 % of the target is 2 % of the step.
  it.each([
    { system: "1/(s+1)", response: firstOrderStep, seconds: 3.912 },
    { system: "1/(s^2+s+1)", response: secondOrderStep(0.5, 1), seconds: 8.0763 },
  ])("$system is within 2 % for good after $seconds s", ({ response, seconds }) => {
    const margin = settlesFrom(response, { band: 0.01, within: 10, after: "command" });
    expect(10 * (1 - (margin ?? Number.NaN))).toBeCloseTo(seconds, 2);
  });

  it("counts from first reaching the band when asked", () => {
    const response = (t: number) => (t < 1 ? 0 : t < 1.5 ? 1 : t < 1.8 ? 1.2 : 1);
    const margin = settlesFrom(response, { band: 0.025, within: 1, after: "reached" }, 5000);
    expect(margin).toBeCloseTo(1 - 0.8, 9);
  });

  it("never met: time over plus the excess over the band, at least -3", () => {
    // Window 1 s .. 4.999 s; boost stays at 190 of 200: excess 5 % - 2.5 % of a band of 2.5 %: one band.
    const pattern = { band: 0.025, within: 2, after: "command" } as const;
    expect(settlesFrom(() => 0.9, pattern, 5000)).toBeCloseTo((2 - 3.999) / 2 - 1, 9);
    expect(settlesFrom(() => 0, pattern, 5000)).toBe(-3);
  });

  it("a window shorter than the time, or a target never reached, is not judged", () => {
    expect(settlesFrom(() => 1, { band: 0.025, within: 5, after: "command" }, 5000)).toBeUndefined();
    expect(settlesFrom(() => 0.5, { band: 0.025, within: 1, after: "reached" }, 5000)).toBeUndefined();
  });

  it("a boost that is not a number never settles", () => {
    expect(settlesFrom(() => Number.NaN, { band: 0.025, within: 1, after: "command" }, 5000)).toBe(-3);
  });
});

describe("rises", () => {
  const risesFrom = (
    response: (seconds: number) => number,
    fraction: number,
    within: number,
    length = 21_000,
  ) => {
    const trace = stepTrace(response, length);
    return rises(trace, findCommands(trace), { kind: "rises", fraction, within });
  };

  // 10-90 % rise time of 1/(s^2+s+1): 1.6376 s; of 1/(s+1): ln 9 = 2.1972 s (recomputed on a fine grid).
  it.each([
    { system: "1/(s+1)", response: firstOrderStep, seconds: Math.log(9) },
    { system: "1/(s^2+s+1)", response: secondOrderStep(0.5, 1), seconds: 1.6376 },
  ])("$system takes $seconds s from 10 to 90 %", ({ response, seconds }) => {
    const at = (fraction: number) => 10 * (1 - (risesFrom(response, fraction, 10) ?? Number.NaN));
    expect(at(0.9) - at(0.1)).toBeCloseTo(seconds, 2);
  });

  it("starts from the boost there was, not from the former target", () => {
    const wanted = (t: number) => (t < 0.9995 ? 100 : 200);
    const boost = (t: number) => (t < 1.4995 ? 120 : t < 1.9995 ? 185 : 200);
    const trace = traceOf(0.001, 5000, { boost_wanted: wanted, boost_pressure: boost });
    // 80 % of the way from 120 is 184 kPa, covered at 0.5 s; 85 % from 100 would be 185, from 120 it is 188.
    const margin = (fraction: number) =>
      rises(trace, findCommands(trace), { kind: "rises", fraction, within: 2 });
    expect(margin(0.8)).toBeCloseTo((2 - 0.5) / 2, 9);
    expect(margin(0.85)).toBeCloseTo((2 - 1) / 2, 9);
  });

  it("never covered: time over plus the missing part, at least -3", () => {
    expect(risesFrom((t) => (t <= 0 ? 0 : 0.45), 0.9, 2, 5000)).toBeCloseTo((2 - 3.999) / 2 - 0.5, 9);
    expect(risesFrom((t) => (t <= 0 ? 0 : -4), 0.9, 2, 5000)).toBe(-3);
  });

  it("is not exercised by falls, nor when the window ends too early to tell", () => {
    expect(risesFrom(() => 0.5, 0.9, 5, 5000)).toBeUndefined();
    const wanted = (t: number) => (t < 0.9995 ? 200 : 100);
    const trace = traceOf(0.001, 5000, { boost_wanted: wanted, boost_pressure: () => 200 });
    expect(rises(trace, findCommands(trace), { kind: "rises", fraction: 0.9, within: 1 })).toBeUndefined();
  });
});

describe("steady error", () => {
  const offset = double({ min: -0.02, max: 0.02, noNaN: true });
  const marginOf = (wanted: (seconds: number) => number, error: (seconds: number) => number) => {
    const ripple = (t: number) => Math.sin(t * 20 * Math.PI);
    const trace = traceOf(0.001, 4000, {
      boost_wanted: wanted,
      boost_pressure: (t) => wanted(t) * (1 + error(t)) + ripple(t),
    });
    return steadyError(trace, findCommands(trace), 0.01, 0.3);
  };

  it("is the mean over the last stretch after each command, either sign, and the worst counts", () => {
    const wanted = (t: number) => (t < 0.9995 ? 100 : t < 1.9995 ? 200 : 150);
    assert(
      property(offset, offset, (first, second) => {
        const margin = marginOf(wanted, (t) => (t < 1.9995 ? first : second));
        const worst = Math.max(Math.abs(first), Math.abs(second));
        expect(margin).toBeCloseTo((0.01 - worst) / 0.01, 6);
      }),
      { seed: 9 },
    );
  });

  it("leaves out the start of a trace, unless nothing follows", () => {
    expect(
      marginOf(
        (t) => (t < 0.9995 ? 100 : 200),
        (t) => (t < 0.9995 ? 0.05 : 0),
      ),
    ).toBeCloseTo(1, 6);
    expect(
      marginOf(
        () => 200,
        () => 0.005,
      ),
    ).toBeCloseTo(0.5, 6);
  });

  it("windows shorter than the stretch are not judged", () => {
    const trace = stepTrace(() => 1, 1200);
    expect(steadyError(trace, findCommands(trace).slice(1), 0.01, 0.3)).toBeUndefined();
  });
});
