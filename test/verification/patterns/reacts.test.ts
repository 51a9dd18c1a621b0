import { array, assert, integer, property } from "fast-check";
import { describe, expect, it } from "vitest";
import type { Pattern } from "../../../spec/requirement-spec.ts";
import { reacts } from "../../../verification/patterns/reacts.ts";
import { comparison, reaction, traceOf } from "../traces.ts";

type Reacts = Extract<Pattern, { kind: "reacts" }>;

const always: Reacts["when"] = comparison("tripped", { above: 0.5 });
const startsTrue = (values: readonly number[]) =>
  traceOf(1, values.length, { boost_pressure: values, tripped: values.map(() => 1) });
const eventually = (then: Reacts["then"], within: number, lasting = 0): Reacts =>
  reaction(always, then, within, lasting);

/** The definition, word for word, without any short cut. */
function byDefinition(values: readonly number[], bound: number, within: number, lasting: number): number {
  const candidates = Array.from({ length: within + 1 }, (_, t) =>
    Math.min(...values.slice(t, t + lasting + 1).map((value) => value - bound)),
  );
  return Math.max(...candidates);
}

describe("reacts", () => {
  it("equals the published max-min formula", () => {
    const values = array(integer({ min: -9, max: 9 }), { minLength: 20, maxLength: 30 });
    const window = integer({ min: 0, max: 8 });
    assert(
      property(values, window, window, (list, within, lasting) => {
        const pattern = eventually(comparison("boost_pressure", { above: 1 }), within, lasting);
        expect(reacts(startsTrue(list), pattern)).toBe(byDefinition(list, 1, within, lasting));
      }),
      { seed: 7 },
    );
  });

  // Hand examples, worked from the published quantitative semantics (Donzé & Maler, FORMATS 2010).
  const x = [0, 2, 4, 6, 5, 4, 3];
  it("F_[0,2](x >= 3) is 1", () => {
    expect(reacts(startsTrue(x), eventually(comparison("boost_pressure", { above: 3 }), 2))).toBe(1);
  });
  it("F_[0,4] G_[0,2](x <= 4.5) is 0.5", () => {
    expect(reacts(startsTrue(x), eventually(comparison("boost_pressure", { below: 4.5 }), 4, 2))).toBe(0.5);
  });
  it("F_[0,0.4](p >= 145) on the boost example is 11", () => {
    const boost = [100, 120, 140, 152, 156, 153, 151, 150, 150, 150, 150];
    const trace = traceOf(0.1, 11, { boost_pressure: boost, tripped: () => 1 });
    expect(reacts(trace, eventually(comparison("boost_pressure", { above: 145 }), 0.4))).toBe(11);
  });
  it("(x >= 5) -> F_[0,2](x <= 4), asked where x comes to 5, is 0 (the least of 5,3,1,0,1)", () => {
    const pattern = reaction(
      comparison("boost_pressure", { above: 5 }),
      comparison("boost_pressure", { below: 4 }),
      2,
      0,
    );
    expect(reacts(traceOf(1, 7, { boost_pressure: x }), pattern)).toBe(0);
  });

  const guard = reaction(
    comparison("turbo_speed", { above: 165, scale: 5 }),
    comparison("wastegate_command", { above: 1, scale: 0.5 }),
    1,
    1,
  );
  it("counts each time the event begins, and the least answer wins", () => {
    const speed = [160, 166, 167, 160, 166, 166, 166, 160];
    const trace = (gate: number[]) => traceOf(1, 8, { turbo_speed: speed, wastegate_command: gate });
    expect(reacts(trace([0, 0, 1, 1, 1, 1, 0, 0]), guard)).toBe(0);
    expect(reacts(trace([0, 0, 1, 1, 0, 0.5, 1, 0]), guard)).toBe(-1);
  });
  it("counts an answer that came in time though the trace ends before the time is over", () => {
    const trace = traceOf(1, 3, { turbo_speed: [1, 1, 166], wastegate_command: [0, 0, 1] });
    expect(reacts(trace, guard)).toBe(0);
  });
  it("is not exercised when the event never comes, or the trace ends before the answer is due", () => {
    const gate = [0, 0, 0];
    expect(reacts(traceOf(1, 3, { turbo_speed: [1, 1, 1], wastegate_command: gate }), guard)).toBeUndefined();
    expect(
      reacts(traceOf(1, 3, { turbo_speed: [1, 1, 166], wastegate_command: gate }), guard),
    ).toBeUndefined();
  });
});
