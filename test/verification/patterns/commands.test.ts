import { array, assert, constantFrom, double, integer, property, record } from "fast-check";
import { describe, expect, it } from "vitest";
import { findCommands } from "../../../verification/patterns/commands.ts";
import { traceOf } from "../traces.ts";

const commandsOf = (length: number, wanted: (seconds: number) => number) =>
  findCommands(traceOf(0.001, length, { boost_wanted: wanted }));

describe("commands in the wanted boost", () => {
  it("are found where they were put, whatever noise below 0.4 % lies on them", () => {
    const steps = array(
      record({ hold: integer({ min: 150, max: 900 }), ratio: constantFrom(0.6, 0.9, 1.1, 1.5) }),
      { minLength: 1, maxLength: 6 },
    );
    assert(
      property(steps, double({ min: 0, max: 0.004, noNaN: true }), (list, noise) => {
        const wanted: number[] = [];
        const expected: number[] = [0];
        let value = 150;
        for (const { hold, ratio } of list) {
          for (let k = 0; k < hold; k++) wanted.push(value * (1 + (k % 2 ? noise : -noise)));
          expected.push(wanted.length);
          value *= ratio;
        }
        for (let k = 0; k < 300; k++) wanted.push(value);
        const trace = traceOf(0.001, wanted.length, { boost_wanted: wanted });
        expect(findCommands(trace).map((command) => command.at)).toEqual(expected);
      }),
      { seed: 3 },
    );
  });

  it("cover the trace without gaps: each window ends where the next change begins", () => {
    const values = array(
      record({ value: double({ min: 90, max: 300, noNaN: true }), hold: integer({ min: 1, max: 400 }) }),
      {
        minLength: 1,
        maxLength: 12,
      },
    );
    assert(
      property(values, (list) => {
        const wanted = list.flatMap(({ value, hold }) => Array<number>(hold).fill(value));
        const found = findCommands(traceOf(0.001, wanted.length, { boost_wanted: wanted }));
        for (const [index, command] of found.entries()) {
          expect(command.at).toBeGreaterThanOrEqual(command.begins);
          expect(command.until).toBeGreaterThan(command.at);
          const next = found[index + 1];
          if (next) expect(command.until).toBe(next.begins);
        }
      }),
      { seed: 4 },
    );
  });

  it("a step up and a step down", () => {
    const found = commandsOf(3000, (t) => (t < 0.9995 ? 160 : t < 1.9995 ? 200 : 180));
    expect(found).toEqual([
      { direction: "hold", begins: 0, at: 0, until: 1000, from: 160, to: 160 },
      { direction: "rise", begins: 1000, at: 1000, until: 2000, from: 160, to: 200 },
      { direction: "fall", begins: 2000, at: 2000, until: 3000, from: 200, to: 180 },
    ]);
  });

  it("a ramp counts from its end, at most 1 % early", () => {
    const [, rise] = commandsOf(3000, (t) => (t < 1 ? 100 : t < 1.5 ? 100 + 200 * (t - 1) : 200));
    expect(rise.direction).toBe("rise");
    expect(rise.to).toBeGreaterThan(198);
    expect(rise.begins).toBeGreaterThanOrEqual(1000);
    expect(rise.begins).toBeLessThanOrEqual(1006);
    expect(rise.at).toBeGreaterThanOrEqual(1490);
    expect(rise.at).toBeLessThanOrEqual(1500);
  });

  it("slow drift opens no window", () => {
    expect(commandsOf(4000, (t) => 200 + 5 * t)).toHaveLength(1);
  });

  it("a short pulse that comes back opens a new hold", () => {
    const found = commandsOf(3000, (t) => (t >= 0.9995 && t < 1.0495 ? 120 : 200));
    expect(found.map((command) => command.direction)).toEqual(["hold", "hold"]);
    expect(found[1]).toMatchObject({ begins: 1000, at: 1050 });
  });

  it("a change still going on at the end ends the last window and is no command", () => {
    const found = commandsOf(1050, (t) => (t < 0.9995 ? 160 : 200));
    expect(found).toEqual([{ direction: "hold", begins: 0, at: 0, until: 1000, from: 160, to: 160 }]);
  });
});
