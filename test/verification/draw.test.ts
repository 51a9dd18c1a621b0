import { array, assert, double, integer, property, tuple } from "fast-check";
import { describe, expect, it } from "vitest";
import { drawCorner, drawRun, scenarioOf } from "../../verification/draw.ts";
import { freeValues } from "../../verification/fix-scenario.ts";
import { fault, free, point, scenario } from "./scenarios.ts";

const ranges = () =>
  array(tuple(double({ min: -1e4, max: 1e4, noNaN: true }), double({ min: 0, max: 1e4, noNaN: true })), {
    minLength: 6,
    maxLength: 6,
  }).map((list) => list.map(([low, width]) => free(low, low + width)));

const everything = (list: ReturnType<typeof free>[]) =>
  scenario({
    engineSpeed: { kind: "imposed", course: [point(free(0), list[0])] },
    target: [point(free(0), free(160)), point(list[1], list[2], list[3])],
    ambient: { temperature: list[4], altitude: free(0) },
    faults: [fault({ values: { area: list[5] } })],
  });

describe("the draw of a run", () => {
  it("lies within every range, at the corners too", () => {
    assert(
      property(ranges(), integer(), integer({ min: 0, max: 1e6 }), (list, seed, index) => {
        const spec = everything(list);
        const free = freeValues(spec);
        for (const draw of [drawRun(spec, 4, seed, index), drawCorner(spec, 4, seed, index)]) {
          expect(draw.values).toHaveLength(free.length);
          draw.values.forEach((value, k) => {
            const slack = 1e-9 * (1 + Math.abs(free[k].free.high) + Math.abs(free[k].free.low));
            expect(value).toBeGreaterThanOrEqual(free[k].free.low - slack);
            expect(value).toBeLessThanOrEqual(free[k].free.high + slack);
          });
          for (const value of draw.scatter) expect(Math.abs(value)).toBeLessThanOrEqual(1);
        }
      }),
      { seed: 10 },
    );
  });

  it("depends on seed, scenario name and index alone, so that the runs before it need not be made", () => {
    const spec = everything([0, 1, 2, 3, 4, 5].map((k) => free(k, k + 1)));
    expect(drawRun(spec, 3, 1, 40)).toEqual(drawRun(spec, 3, 1, 40));
    expect(drawRun(spec, 3, 1, 40)).not.toEqual(drawRun(spec, 3, 1, 41));
    expect(drawRun(spec, 3, 1, 40)).not.toEqual(drawRun({ ...spec, name: "other" }, 3, 1, 40));
  });

  it("has its first corner at the middle of everything, the next two at the ends", () => {
    const spec = everything([1, 2, 3, 4, 5, 6].map((k) => free(k, k + 2)));
    expect(drawCorner(spec, 2, 1, 0).scatter).toEqual([0, 0]);
    expect(drawCorner(spec, 2, 1, 1).values).toEqual(freeValues(spec).map(({ free }) => free.low));
    expect(drawCorner(spec, 2, 1, 2).values).toEqual(freeValues(spec).map(({ free }) => free.high));
  });
});

describe("the scenario a draw stands for", () => {
  const spec = everything([1, 2, 3, 4, 5, 6].map((k) => free(10 * k, 10 * k + 1)));
  const draw = drawRun(spec, 0, 1, 0);

  it("puts each drawn number in its place", () => {
    const fixed = scenarioOf(spec, { ...draw, values: [11, 21, 31, 41, 51, 61] });
    expect(freeValues(spec).map(({ name }) => name)).toEqual([
      "engine_speed",
      "target[1].at",
      "target[1].value",
      "target[1].over",
      "ambient.temperature",
      "faults[0].area",
    ]);
    expect(fixed.engineSpeed).toEqual({ kind: "imposed", course: [{ at: 0, value: 11, over: 0 }] });
    expect(fixed.target?.[1]).toEqual({ at: 21, value: 31, over: 41 });
    expect(fixed.ambient).toEqual({ temperature: 51, altitude: 0 });
    expect(fixed.faults).toEqual([{ kind: "boost_leak", from: 1, lasting: Infinity, values: { area: 61 } }]);
    expect(fixed.noiseSeed).toBe(draw.noiseSeed);
  });

  it("can leave out noise, faults and the end", () => {
    const fixed = scenarioOf(spec, { ...draw, noise: 0, faults: [false], duration: 2 });
    expect(fixed).toMatchObject({ sensorNoise: 0, faults: [], duration: 2 });
    expect(scenarioOf(spec, { ...draw, duration: 9 }).duration).toBe(5);
  });
});
