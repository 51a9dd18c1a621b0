import { describe, expect, it } from "vitest";
import { findCommands } from "../../../verification/patterns/commands.ts";
import { judge } from "../../../verification/patterns/judge.ts";
import { stepTrace, traceOf } from "../traces.ts";

/** Boost (kPa) after a step of the target from 100 to 200 kPa at 1 s, `seconds` after the step. */
const answered = (boost: (seconds: number) => number, length: number) =>
  stepTrace((seconds) => (boost(seconds) - 100) / 100, length);
const marginOf = (pattern: Parameters<typeof judge>[0], trace: ReturnType<typeof traceOf>) =>
  judge(pattern, trace, findCommands(trace));

// The examples of verification/README.md, worked there by hand.
describe("the hand-checked examples of the documentation", () => {
  it("commands: a rise at 1 s until 2 s, a fall at 2 s until 3 s", () => {
    const wanted = (t: number) => (t < 0.9995 ? 160 : t < 1.9995 ? 200 : 180);
    const found = findCommands(traceOf(0.001, 3000, { boost_wanted: wanted }));
    expect(found.slice(1).map(({ direction, at, until }) => [direction, at, until])).toEqual([
      ["rise", 1000, 2000],
      ["fall", 2000, 3000],
    ]);
  });

  it("overshoot: a peak of 206 over 200, at most 4.5 %, is 0.333", () => {
    const trace = answered((t) => (t < 0.5 ? 150 : t < 0.6 ? 206 : 200), 3000);
    expect(marginOf({ kind: "overshoot", of: "target", atMost: 0.045 }, trace)).toBeCloseTo(1 / 3, 3);
  });

  it("settles: last outside 0.3 s after the step, within 1.2 s, is 0.75; never met is -2", () => {
    const settles = { kind: "settles", band: 0.025, after: "command" } as const;
    const settled = answered((t) => (t < 0.2995 ? 150 : 200), 3000);
    expect(marginOf({ ...settles, within: 1.2 }, settled)).toBeCloseTo(0.75, 9);
    const low = answered((t) => (t < 0 ? 100 : 190), 5001);
    expect(marginOf({ ...settles, within: 2 }, low)).toBeCloseTo(-2, 9);
  });

  it("rises: 95 % after 0.9 s, within 4.5 s, is 0.8", () => {
    const trace = answered((t) => (t < 0.8995 ? 150 : 200), 7000);
    expect(marginOf({ kind: "rises", fraction: 0.95, within: 4.5 }, trace)).toBeCloseTo(0.8, 9);
  });

  it("steady error: -0.1 % of at most 0.4 % is 0.75", () => {
    const trace = answered((t) => (t < 0.5 ? 150 : 199.8), 3000);
    expect(marginOf({ kind: "steady_error", atMost: 0.004, over: 0.3 }, trace)).toBeCloseTo(0.75, 6);
  });
});
