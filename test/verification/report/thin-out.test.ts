import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { dropLevel, thinOut } from "../../../verification/report/charts/thin-out.ts";

const series = fc.array(fc.double({ min: -1e6, max: 1e6, noNaN: true }), { minLength: 1, maxLength: 3000 });

describe("thinning a series for a chart", () => {
  test("keeps the first, the last, the least and the most value, in order of time, and few enough", () => {
    fc.assert(
      fc.property(series, fc.integer({ min: 1, max: 60 }), (values, buckets) => {
        const samples = thinOut(values, values.length, 0.5, buckets);
        const ys = samples.map(({ y }) => y);
        expect(samples.length).toBeLessThanOrEqual(Math.max(2 * buckets + 2, 3));
        expect(samples[0]).toEqual({ x: 0, y: values[0] });
        expect(samples.at(-1)).toEqual({ x: (values.length - 1) * 0.5, y: values.at(-1) });
        expect(Math.max(...ys)).toBe(Math.max(...values));
        expect(Math.min(...ys)).toBe(Math.min(...values));
        expect(samples.every(({ x }, i) => i === 0 || x > samples[i - 1].x)).toBe(true);
        expect(samples.every(({ x, y }) => values[x / 0.5] === y)).toBe(true);
      }),
      { seed: 20_614 },
    );
  });

  test("a value that is not finite stays visible as a gap", () => {
    const values = Array.from({ length: 1000 }, (_, i) => (i === 503 ? Infinity : i));
    expect(thinOut(values, 1000, 1, 20).filter(({ y }) => Number.isNaN(y))).toEqual([
      { x: 503, y: Number.NaN },
    ]);
  });

  test("only as many values as asked for are read: the array may be longer", () => {
    expect(thinOut([1, 2, 3, 99], 3, 1, 50)).toEqual([
      { x: 0, y: 1 },
      { x: 1, y: 2 },
      { x: 2, y: 3 },
    ]);
    expect(thinOut([], 0, 1, 10)).toEqual([]);
  });

  test("dropping level stretches leaves the line where it was", () => {
    const at = (samples: readonly { x: number; y: number }[], x: number): number => {
      const after = samples.findIndex((sample) => sample.x >= x);
      const [b, a] = [samples[after], samples[Math.max(after - 1, 0)]];
      return b.x === a.x ? b.y : a.y + ((x - a.x) / (b.x - a.x)) * (b.y - a.y);
    };
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 2 }), { minLength: 1, maxLength: 60 }), (values) => {
        const all = values.map((y, x) => ({ x, y }));
        const fewer = dropLevel(all);
        for (const { x, y } of all) expect(at(fewer, x)).toBe(y);
      }),
      { seed: 20_615 },
    );
  });
});
