import { array, assert, constant, double, oneof, property } from "fast-check";
import { describe, expect, it } from "vitest";
import { summarise } from "../../verification/summarise.ts";

const margins = () =>
  array(oneof(double({ min: -3, max: 5, noNaN: true }), constant(Number.NaN)), { maxLength: 80 });

describe("the summary of margins", () => {
  it("accounts for every run, and its verdict follows from the signs", () => {
    assert(
      property(margins(), (list) => {
        const summary = summarise(Float64Array.from(list));
        const exercised = list.filter((margin) => !Number.isNaN(margin));
        expect(summary.runs).toBe(list.length);
        expect(summary.exercised).toBe(exercised.length);
        expect(summary.violations).toBe(exercised.filter((margin) => margin < 0).length);
        const verdict =
          exercised.length === 0 ? "not_exercised" : summary.violations > 0 ? "violated" : "holds";
        expect(summary.verdict).toBe(verdict);
        const inBins = summary.margins?.histogram.counts.reduce((sum, count) => sum + count, 0) ?? 0;
        expect(inBins).toBe(exercised.length);
        if (exercised.length > 0) expect(summary.worst?.margin).toBe(Math.min(...exercised));
        if (summary.worst) expect(list[summary.worst.run]).toBe(summary.worst.margin);
      }),
      { seed: 11 },
    );
  });

  it("does not depend on the order of runs, but for the index of the worst", () => {
    assert(
      property(margins(), (list) => {
        const { worst: one, ...forward } = summarise(Float64Array.from(list));
        const { worst: two, ...backward } = summarise(Float64Array.from([...list].reverse()));
        expect(forward).toEqual(backward);
        expect(one?.margin).toBe(two?.margin);
      }),
      { seed: 12 },
    );
  });

  it("counts the edge itself, 0, as holding", () => {
    expect(summarise(Float64Array.of(0, 1))).toMatchObject({ verdict: "holds", violations: 0 });
  });

  it("gives nearest-rank quantiles: of 1..100 the 5th, 50th and 95th value", () => {
    const list = Float64Array.from({ length: 100 }, (_, k) => (100 - k) / 100);
    expect(summarise(list).margins?.quantiles).toEqual({
      least: 0.01,
      p05: 0.05,
      median: 0.5,
      p95: 0.95,
      most: 1,
    });
  });
});
