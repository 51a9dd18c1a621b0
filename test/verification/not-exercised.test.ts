import { array, assert, constantFrom, property, record } from "fast-check";
import { describe, expect, it } from "vitest";
import type { Verdict } from "../../verification/evidence.ts";
import { neverExercised, whyNotExercised } from "../../verification/index.ts";
import { sampleResult } from "./report/sample-evidence.ts";

const results = () =>
  array(
    record({
      id: constantFrom("a", "b", "c"),
      verdict: constantFrom<Verdict>("holds", "violated", "not_exercised"),
    }),
  );

describe("requirements exercised nowhere", () => {
  it("are those of whose results every one is silent, each once", () => {
    assert(
      property(results(), (list) => {
        const ids = neverExercised(list.map(sampleResult)).map(({ id }) => id);
        expect(new Set(ids).size).toBe(ids.length);
        for (const id of ["a", "b", "c"]) {
          const own = list.filter((result) => result.id === id);
          const silent = own.length > 0 && own.every(({ verdict }) => verdict === "not_exercised");
          expect(ids.includes(id)).toBe(silent);
        }
      }),
      { seed: 31 },
    );
  });

  it("have a reason of their own for each pattern, and one for a kind that is not known", () => {
    const kinds = ["stays", "reacts", "overshoot", "settles", "rises", "steady_error", "toString"];
    expect(new Set(kinds.map(whyNotExercised)).size).toBe(kinds.length);
    expect(whyNotExercised("stays")).toBe("its `while` was never true");
  });
});
