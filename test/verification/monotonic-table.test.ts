import { array, assert, double, integer, property } from "fast-check";
import { describe, expect, it } from "vitest";
import { monotonicTable } from "../../verification/monotonic-table.ts";

describe("a monotonic table", () => {
  it("never rises down a column nor falls along a row, and leaves a monotonic one alone", () => {
    const opening = double({ min: 0, max: 1, noNaN: true });
    const tables = integer({ min: 1, max: 5 }).chain((columns) =>
      array(array(opening, { minLength: columns, maxLength: columns }), { minLength: 1, maxLength: 5 }).map(
        (rows) => ({ columns, openings: rows.flat() }),
      ),
    );
    assert(
      property(tables, ({ columns, openings }) => {
        const made = monotonicTable(openings, columns);
        made.forEach((value, i) => {
          if (i >= columns) expect(value).toBeLessThanOrEqual(made[i - columns]);
          if (i % columns > 0) expect(value).toBeGreaterThanOrEqual(made[i - 1]);
        });
        expect(monotonicTable(made, columns)).toEqual(made);
      }),
      { seed: 20 },
    );
  });

  it("continues a cell without a steady state from the row above it", () => {
    expect(monotonicTable([0.2, 0.6, 0.3, 0.5], 2)).toEqual([0.2, 0.6, 0.2, 0.5]);
  });
});
