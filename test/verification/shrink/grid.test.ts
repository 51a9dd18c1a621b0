import { assert, double, integer, property } from "fast-check";
import { describe, expect, it } from "vitest";
import { gridOver, gridValue, nearestOnGrid } from "../../../verification/shrink/grid.ts";
import { free } from "../scenarios.ts";

describe("a grid of round values", () => {
  it("lies in its range, has at least as many steps as asked less one, and finds its own values again", () => {
    const low = double({ min: -1e4, max: 1e4, noNaN: true });
    const width = double({ min: 1e-3, max: 1e4, noNaN: true });
    assert(
      property(low, width, integer({ min: 2, max: 200 }), (from, size, divisions) => {
        const grid = gridOver(free(from, from + size), divisions);
        expect(grid.most - grid.least).toBeGreaterThanOrEqual(divisions - 1);
        for (const k of [grid.least, 0, grid.most]) {
          const value = gridValue(grid, k);
          expect(value).toBeGreaterThanOrEqual(from - 1e-6 * grid.step);
          expect(value).toBeLessThanOrEqual(from + size + 1e-6 * grid.step);
          expect(nearestOnGrid(grid, value)).toBe(k);
        }
      }),
      { seed: 15 },
    );
  });

  it("of 3000 to 6500 rpm in 20 steps is every 100 rpm about 4800 rpm", () => {
    const grid = gridOver(free(3000, 6500, "rpm"), 20);
    expect(gridValue(grid, 0)).toBe(4800);
    expect(gridValue(grid, 1)).toBe(4900);
    expect(gridValue(grid, nearestOnGrid(grid, 3148))).toBe(3100);
    expect([gridValue(grid, grid.least), gridValue(grid, grid.most)]).toEqual([3000, 6500]);
  });

  it("of -10 to 42 degC is whole degrees, stored in kelvin", () => {
    const grid = gridOver(free(263.15, 315.15, "degC"), 20);
    expect(gridValue(grid, 0)).toBe(289.15);
    expect(grid.step).toBe(2);
  });
});
