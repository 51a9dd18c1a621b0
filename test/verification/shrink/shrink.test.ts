import { array, assert, double, integer, property } from "fast-check";
import { describe, expect, it } from "vitest";
import { type Draw, drawRun } from "../../../verification/draw.ts";
import { shrink } from "../../../verification/shrink/shrink.ts";
import { fault, free, point, scenario } from "../scenarios.ts";

const spec = scenario({
  engineSpeed: { kind: "imposed", course: [point(free(0), free(3000, 6500, "rpm"))] },
  ambient: { temperature: free(263.15, 315.15, "degC"), altitude: free(0, 2500, "m") },
  faults: [fault(), fault()],
});
const SPEED = 0;
const ALTITUDE = 2;

/** Violates above 5000 rpm. */
const fast = (draw: Draw) => (5000 - draw.values[SPEED]) / 1000;
const startWhere = (violates: (draw: Draw) => boolean) => {
  for (let index = 0; ; index++) {
    const draw = drawRun(spec, 4, 1, index);
    if (violates(draw)) return draw;
  }
};

describe("shrinking", () => {
  it("always ends at a run that violates, within its budget, the same each time", () => {
    const weights = array(double({ min: -1, max: 1, noNaN: true }), { minLength: 7, maxLength: 7 });
    assert(
      property(
        weights,
        integer({ min: 1, max: 300 }),
        integer({ min: 0, max: 999 }),
        (weight, budget, index) => {
          const start = drawRun(spec, 4, 1, index);
          const size = (draw: Draw) =>
            [draw.values[0] / 6500, draw.values[1] / 315, draw.values[2] / 2500, ...draw.scatter].reduce(
              (sum, value, k) => sum + weight[k] * value,
              0,
            ) + (draw.faults[0] ? 0.1 : 0);
          const bound = size(start);
          let simulations = 0;
          const marginOf = (draw: Draw) => {
            simulations++;
            return bound - 1e-9 - size(draw);
          };
          const small = shrink(spec, start, marginOf, budget);
          expect(marginOf(small.draw)).toBeLessThan(0);
          expect(small.margin).toBeLessThan(0);
          expect(small.simulations).toBeLessThanOrEqual(budget);
          expect(simulations - 1).toBe(small.simulations);
          expect(shrink(spec, start, marginOf, budget)).toEqual(small);
        },
      ),
      { seed: 16, numRuns: 60 },
    );
  });

  it("puts everything that does not matter at its simplest, and the rest at the round edge of violation", () => {
    const { draw } = shrink(
      spec,
      startWhere((each) => fast(each) < 0),
      fast,
      500,
    );
    expect(draw.values).toEqual([5100, 289.15, 1300]);
    expect(draw.scatter).toEqual([0, 0, 0, 0]);
    expect(draw).toMatchObject({ noise: 0, faults: [false, false], duration: 0.1 });
  });

  it("keeps noise, faults, scatter and length where the violation needs them", () => {
    const needy = (draw: Draw) =>
      draw.noise === 1 && draw.faults[1] && draw.scatter[2] < -0.35 && (draw.duration ?? 5) > 2.45
        ? fast(draw)
        : undefined;
    const { draw } = shrink(
      spec,
      startWhere((each) => (needy(each) ?? 0) < 0),
      needy,
      500,
    );
    expect(draw).toMatchObject({ noise: 1, faults: [false, true], scatter: [0, 0, -0.4, 0], duration: 2.5 });
    expect(draw.values[SPEED]).toBe(5100);
  });

  it("uses a finer grid when the round one misses the violation", () => {
    const narrow = (draw: Draw) => Math.abs(draw.values[ALTITUDE] - 1234) - 8;
    const { draw } = shrink(
      spec,
      startWhere((each) => narrow(each) < 0),
      narrow,
      500,
    );
    expect(Math.abs(draw.values[ALTITUDE] - 1234)).toBeLessThan(8);
    expect(draw.values[ALTITUDE] % 10).toBe(0);
  });

  it("refuses a run that does not violate", () => {
    expect(() => shrink(spec, drawRun(spec, 4, 1, 0), () => 1, 10)).toThrow("violates");
  });
});
