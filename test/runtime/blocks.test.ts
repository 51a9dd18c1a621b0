import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { filteredRate } from "../../runtime/feedback.ts";
import { mayIntegrate, nextIntegral } from "../../runtime/integral.ts";
import { blend, interpolateCurve, interpolateTable, locate } from "../../runtime/interpolate.ts";
import { clamp, max, min, same, toCount } from "../../runtime/intrinsics.ts";
import { lowPass } from "../../runtime/low-pass.ts";
import { rateLimit } from "../../runtime/rate-limit.ts";
import { CALIBRATION, STRUCTURE } from "./fixtures.ts";

const finite = fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e6, max: 1e6 });
const any = fc.double();

describe("intrinsics", () => {
  test("clamp gives the low side on NaN and stays inside for every bit pattern", () => {
    expect(clamp(Number.NaN, 2, 5)).toBe(2);
    fc.assert(
      fc.property(any, finite, finite, (x, a, b) => {
        const low = Math.min(a, b);
        const high = Math.max(a, b);
        const y = clamp(x, low, high);
        return y >= low && y <= high;
      }),
    );
  });

  test("min and max give the second operand when one is NaN or both are equal", () => {
    expect(min(Number.NaN, 1)).toBe(1);
    expect(max(1, Number.NaN)).toBeNaN();
    expect(Object.is(min(0, -0), -0)).toBe(true);
    expect(Object.is(max(0, -0), -0)).toBe(true);
  });

  test("toCount saturates, truncates towards zero, and NaN gives the low bound", () => {
    expect(toCount(Number.NaN, -3, 9)).toBe(-3);
    expect(toCount(1e30, -3, 9)).toBe(9);
    expect(toCount(-1.9, -3, 9)).toBe(-1);
    expect(toCount(2.9, -3, 9)).toBe(2);
  });

  test("same needs two finite equal values, and takes 0 and -0 as equal", () => {
    expect(same(0, -0)).toBe(true);
    expect(same(Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY)).toBe(false);
    expect(same(Number.NaN, Number.NaN)).toBe(false);
  });
});

describe("interpolation", () => {
  const axis = fc
    .uniqueArray(fc.integer({ min: -1000, max: 1000 }), { minLength: 2, maxLength: 12 })
    .map((a) => a.sort((p, q) => p - q));

  test("a blend never leaves the hull of its ends, though a + (b - a) t can", () => {
    fc.assert(
      fc.property(finite, finite, fc.double({ min: 0, max: 1, noNaN: true }), (a, b, t) => {
        const y = blend(a, b, t);
        return y >= Math.min(a, b) && y <= Math.max(a, b);
      }),
    );
  });

  test("a curve passes through its nodes and holds its ends", () => {
    fc.assert(
      fc.property(axis, (nodes) => {
        const values = nodes.map((x, i) => Math.sin(x) * 100 + i);
        nodes.forEach((x, i) => {
          expect(interpolateCurve(nodes, values, x)).toBeCloseTo(values[i], 10);
        });
        expect(interpolateCurve(nodes, values, -1e9)).toBe(values[0]);
        expect(interpolateCurve(nodes, values, 1e9)).toBeCloseTo(values[values.length - 1], 10);
      }),
    );
  });

  test("a table is exact for a bilinear function between its nodes", () => {
    const rows = [0, 10, 40];
    const columns = [100, 200, 500, 600];
    const f = (r: number, c: number) => 3 + 2 * r - 0.5 * c;
    const values = rows.flatMap((r) => columns.map((c) => f(r, c)));
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: 40, noNaN: true }),
        fc.double({ min: 100, max: 600, noNaN: true }),
        (r, c) => {
          expect(interpolateTable(rows, columns, values, r, c)).toBeCloseTo(f(r, c), 8);
        },
      ),
    );
  });

  test("the index stays inside the axis for every bit pattern", () => {
    fc.assert(
      fc.property(axis, any, (nodes, x) => {
        const index = locate(nodes, x);
        return Number.isInteger(index) && index >= 0 && index <= Math.max(0, nodes.length - 2);
      }),
    );
  });
});

describe("filters and limits", () => {
  test("a low-pass stays between its previous value and its input", () => {
    fc.assert(
      fc.property(finite, finite, fc.double({ min: 0, max: 10, noNaN: true }), (y, x, tau) => {
        const state = { value: y, primed: true };
        const next = lowPass(state, x, tau, 0.005);
        return next >= Math.min(x, y) && next <= Math.max(x, y);
      }),
    );
  });

  test("a low-pass of 1/(s+1) at 0.1 s follows y = 0.9090909 y + 0.0909091 x (backward Euler)", () => {
    // source: discretisation recomputed and cross-checked with python-control 0.10.2 (check values, 6.7)
    const state = { value: 0, primed: true };
    expect(lowPass(state, 1, 1, 0.1)).toBeCloseTo(0.0909091, 7);
    expect(lowPass(state, 1, 1, 0.1)).toBeCloseTo(0.0909091 + 0.9090909 * 0.0909091, 6);
  });

  test("a filtered derivative with Td 0.5, N 10, T 0.01 has a 0.83333333 and b 8.33333333", () => {
    // source: backward-difference filtered derivative, recomputed (check values, 6.7); d = a d + b dy with b = Td / (Tf + T)
    const filter = 0.5 / 10;
    const held = filteredRate(1, 0, 0, filter, 0.01);
    const fresh = 0.5 * filteredRate(0, 0, 1, filter, 0.01);
    expect(held).toBeCloseTo(0.83333333, 8);
    expect(fresh).toBeCloseTo(8.33333333, 8);
  });

  test("a rate limiter reaches what is within reach exactly, and never moves faster", () => {
    fc.assert(
      fc.property(finite, finite, (from, to) => {
        const next = rateLimit(from, to, 100, 50, 0.01);
        const up = from + 100 * 0.01;
        const down = from - 50 * 0.01;
        if (to <= up && to >= down) return next === to;
        return to > up ? next === up : next === down;
      }),
    );
  });
});

describe("anti-windup", () => {
  // source: published back-calculation and conditional-integration forms; vector recomputed (check values, 6.9):
  // Kp 2, Ki 4, Tt 0.5 s, Ts 0.1 s, u within -1 .. 1.5, e = 1 1 1 1 -0.2 -0.2 -0.2;
  // order v = Kp e + I; u = sat(v); I += Ts (Ki e + (u - v) / Tt)
  const errors = [1, 1, 1, 1, -0.2, -0.2, -0.2];
  const run = (antiWindup: "back_calculation" | "conditional" | "none") => {
    const structure = { ...STRUCTURE, stepS: 0.1, antiWindup };
    const calibration = { ...CALIBRATION, trackingTimeS: 0.5, trimLow: -100, trimHigh: 100, windupBand: 1e9 };
    let integral = 0;
    return errors.map((e) => {
      const v = 2 * e + integral;
      const u = Math.min(1.5, Math.max(-1, v));
      const before = integral;
      const allowed = mayIntegrate(calibration, e, 0, v <= -1, v >= 1.5, false);
      integral = nextIntegral(structure, calibration, integral, 4 * e, allowed, v, u);
      return { u, before };
    });
  };

  test("back-calculation gives the published sequence", () => {
    const out = run("back_calculation");
    const expectedU = [1.5, 1.5, 1.5, 1.5, 0.4856, 0.4056, 0.3256];
    const expectedI = [0, 0.3, 0.54, 0.732, 0.8856, 0.8056, 0.7256];
    out.forEach((o, i) => {
      expect(o.u).toBeCloseTo(expectedU[i], 10);
      expect(o.before).toBeCloseTo(expectedI[i], 10);
    });
  });

  test("conditional integration gives the published sequence", () => {
    const out = run("conditional");
    const expectedU = [1.5, 1.5, 1.5, 1.5, -0.4, -0.48, -0.56];
    const expectedI = [0, 0, 0, 0, 0, -0.08, -0.16];
    out.forEach((o, i) => {
      expect(o.u).toBeCloseTo(expectedU[i], 10);
      expect(o.before).toBeCloseTo(expectedI[i], 10);
    });
  });

  test("without anti-windup the integral keeps growing while saturated", () => {
    expect(run("none")[4].before).toBeCloseTo(4 * 0.1 * 4, 10);
  });

  test("the integral freezes while the guard holds the gate", () => {
    expect(mayIntegrate(CALIBRATION, 0.01, 0, false, false, true)).toBe(false);
    expect(mayIntegrate(CALIBRATION, 0.01, 0, false, false, false)).toBe(true);
  });
});
