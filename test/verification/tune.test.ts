import { describe, expect, it } from "vitest";
import { parse } from "yaml";
import { setInSpec, tuneFeedforward, writeTuning } from "../../verification/index.ts";
import { exampleLoop, exampleText } from "./example-loop.ts";

const loop = exampleLoop();
const tuning = tuneFeedforward(loop);
const table = loop.controller.feedforward;
const curve = loop.controller.wastegateArea;
if (!table || !curve || !tuning.feedforward || !tuning.gateArea)
  throw new Error("the example has lost its tables");
const cell = (ratio: number, rpm: number) =>
  tuning.feedforward?.[table.rows.indexOf(ratio) * table.columns.length + table.columns.indexOf(rpm)];

describe("tuning the feedforward", () => {
  it("makes a gate curve that rises, from the leak to nearly the port's area", () => {
    const [leak] = tuning.gateArea ?? [];
    expect(leak).toBe(4);
    for (let i = 1; i < curve.axis.length; i++) {
      expect(tuning.gateArea?.[i]).toBeGreaterThan(tuning.gateArea?.[i - 1] ?? 0);
    }
    // 4 + 700 * 0.6 / sqrt(1 + 0.6^2) mm2 at 30 %: curtain and port in series, by hand.
    expect(tuning.gateArea?.[curve.axis.indexOf(0.3)]).toBeCloseTo(4 + (700 * 0.6) / Math.sqrt(1.36), 1);
  });

  // Steady map of the invented engine by an independent solver, 240 kPa abs: opening 0.182 at 4000 rpm, 0.286 at 5000,
  // 0.367 at 6000, 0.417 at 7000. The table's row is pressure ratio 2.4, 243 kPa: a little less open.
  it.each([
    [4000, 0.182],
    [5000, 0.286],
    [6000, 0.367],
    [7000, 0.417],
  ])("at %i rpm the area that holds 2.4 is that of an opening near %f", (rpm, opening) => {
    const area = 4 + (700 * 2 * opening) / Math.sqrt(1 + 4 * opening * opening);
    expect(cell(2.4, rpm)).toBeLessThan(area);
    expect(cell(2.4, rpm)).toBeGreaterThan(0.96 * area);
  });

  it("never asks for a more open gate at more pressure, or a more closed one at more engine speed", () => {
    for (let i = 0; i < table.rows.length; i++) {
      for (let j = 0; j < table.columns.length; j++) {
        const here = cell(table.rows[i], table.columns[j]) ?? Number.NaN;
        if (i > 0) expect(here).toBeLessThanOrEqual(cell(table.rows[i - 1], table.columns[j]) ?? 0);
        if (j > 0) expect(here).toBeGreaterThanOrEqual(cell(table.rows[i], table.columns[j - 1]) ?? 0);
      }
    }
  });

  it("says which cells the plant cannot hold, and why", () => {
    const at2000 = tuning.outOfReach.filter(({ column }) => table.columns[column] === 2000);
    expect(at2000.length).toBeGreaterThanOrEqual(table.rows.length - 1);
    expect(tuning.outOfReach.find(({ row }) => table.rows[row] === 1)?.why).toMatch(
      /open gives 1\.\d\d bar abs/,
    );
  });

  it("is what the complete example holds already", () => {
    expect(table.values).toEqual(tuning.feedforward);
  });

  it("writes its values into the spec and leaves everything else alone, comments too", () => {
    const blank = setInSpec(
      exampleText(),
      "controller.feedforward.values",
      table.rows.map(() => table.columns.map(() => 1)),
    );
    const text = writeTuning(blank, loop, tuning);
    expect(exampleLoop(text).controller.feedforward?.values).toEqual(tuning.feedforward);
    expect(exampleLoop(text).controller.wastegateArea?.values).toEqual(tuning.gateArea);
    const comments = (source: string) => source.match(/#.*/g);
    expect(comments(text)).toEqual(comments(exampleText()));
    const others = (source: string) => {
      const data = parse(source);
      delete data.controller.feedforward.values;
      delete data.controller.wastegate.effective_area.values;
      return data;
    };
    expect(others(text)).toEqual(others(exampleText()));
  });

  it("writes openings where the loop works in openings", () => {
    const opening = setInSpec(exampleText(), "controller.feedforward.unit", "%");
    const inPercent = writeTuning(
      opening,
      { ...loop, controller: { ...loop.controller, feedforward: { ...table, unit: "%" } } },
      {
        feedforward: table.values.map(() => 0.25),
        outOfReach: [],
      },
    );
    expect(
      parse(inPercent)
        .controller.feedforward.values.flat()
        .every((value: number) => value === 25),
    ).toBe(true);
  });
});
