import { array, assert, double, property } from "fast-check";
import { describe, expect, it } from "vitest";
import { WORST_MARGIN } from "../../../verification/patterns/margin.ts";
import { stays } from "../../../verification/patterns/stays.ts";
import { comparison, traceOf } from "../traces.ts";

const samples = () => array(double({ min: -1e6, max: 1e6, noNaN: true }), { minLength: 1, maxLength: 50 });
const pressure = (values: readonly number[]) => traceOf(1, values.length, { boost_pressure: values });

describe("stays", () => {
  it("is positive only if every sample holds, negative only if one does not (soundness)", () => {
    assert(
      property(samples(), double({ min: -1e6, max: 1e6, noNaN: true }), (values, bound) => {
        const margin = stays(pressure(values), comparison("boost_pressure", { below: bound }));
        if (margin === undefined) throw new Error("always exercised");
        if (margin > 0) expect(values.every((value) => value < bound)).toBe(true);
        if (margin < 0) expect(values.some((value) => value > bound)).toBe(true);
      }),
      { seed: 5 },
    );
  });

  it("a disturbance smaller than the margin cannot change the verdict (Fainekos & Pappas 2009)", () => {
    const small = double({ min: -0.99, max: 0.99, noNaN: true });
    assert(
      property(samples(), array(small, { minLength: 50, maxLength: 50 }), (values, disturbances) => {
        const holds = comparison("boost_pressure", { above: -20, below: 30, scale: 4 });
        const margin = stays(pressure(values), holds) ?? 0;
        const disturbed = values.map((value, k) => value + disturbances[k] * Math.abs(margin) * 4);
        const after = stays(pressure(disturbed), holds) ?? 0;
        expect(Math.sign(after)).toBe(Math.sign(margin));
      }),
      { seed: 6 },
    );
  });

  // Hand examples, worked from the published quantitative semantics (Donzé & Maler, FORMATS 2010).
  it("G_[0,6](x <= 5.5) on 0,2,4,6,5,4,3 is -0.5", () => {
    const margin = stays(pressure([0, 2, 4, 6, 5, 4, 3]), comparison("boost_pressure", { below: 5.5 }));
    expect(margin).toBe(-0.5);
  });

  const boost = [100, 120, 140, 152, 156, 153, 151, 150, 150, 150, 150];
  it("G(p <= 157.5) on the boost example is 1.5", () => {
    expect(stays(pressure(boost), comparison("boost_pressure", { below: 157.5 }))).toBe(1.5);
  });
  it("G_[0.5,1.0](|p - 150| <= 3) on the boost example is 0", () => {
    const band = comparison("boost_pressure", { above: 147, below: 153 });
    expect(stays(pressure(boost.slice(5)), band)).toBe(0);
  });

  it("looks only at samples where the condition is true, and is not exercised when it never is", () => {
    const trace = traceOf(1, 4, { turbo_speed: [1, 9, 2, 3], guard_active: [0, 0, 1, 1] });
    const holds = comparison("turbo_speed", { below: 5, scale: 2 });
    expect(stays(trace, holds, comparison("guard_active", { above: 0.5 }))).toBe(1);
    expect(stays(trace, holds)).toBe(-2);
    expect(stays(trace, holds, comparison("guard_active", { above: 2 }))).toBeUndefined();
  });

  it("is violated by a sample that is not a number", () => {
    const holds = comparison("boost_pressure", { below: 5 });
    expect(stays(pressure([1, Number.NaN, 2]), holds)).toBe(WORST_MARGIN);
  });
});
