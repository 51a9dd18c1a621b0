import { array, assert, constantFrom, integer, property, record } from "fast-check";
import { describe, expect, it } from "vitest";
import { neverExercised, untested, whyNotExercised } from "../../verification/not-exercised.ts";
import { sampleResult } from "./report/sample-evidence.ts";

const counts = () => integer({ min: 0, max: 2 });
const IDS = ["a", "b", "c"];

/** Results of up to three requirements, of which only the runs that exercised them matter here. */
const results = () =>
  array(
    record({ id: constantFrom(...IDS), exercised: counts(), corner: counts() }).map(
      ({ id, exercised, corner }) =>
        sampleResult({
          id,
          exercised,
          verdict: exercised > 0 ? "holds" : "not_exercised",
          corners: { runs: 2, exercised: corner, violations: 0 },
        }),
    ),
  );

const sum = (list: readonly number[]): number => list.reduce((total, each) => total + each, 0);

describe("requirements without a run", () => {
  it("are exercised nowhere if neither a random nor a corner run counts, untested if no random run does", () => {
    assert(
      property(results(), (list) => {
        const never = neverExercised(list).map(({ id }) => id);
        const notTested = untested(list).map(({ id }) => id);
        for (const id of IDS) {
          const own = list.filter((result) => result.id === id);
          const random = sum(own.map(({ exercised }) => exercised));
          const corner = sum(own.map(({ corners }) => corners.exercised));
          expect(never.filter((each) => each === id)).toHaveLength(
            own.length > 0 && random + corner === 0 ? 1 : 0,
          );
          expect(notTested.filter((each) => each === id)).toHaveLength(
            own.length > 0 && random === 0 ? 1 : 0,
          );
        }
      }),
      { seed: 31 },
    );
  });

  it("are tested all the same if a corner run violates them", () => {
    const corners = { runs: 2, exercised: 1, violations: 1 };
    const broken = sampleResult({ verdict: "violated", exercised: 0, corners });
    expect(untested([broken])).toEqual([]);
  });

  it("have a reason of their own for each pattern, and one for a kind that is not known", () => {
    const kinds = ["stays", "reacts", "overshoot", "settles", "rises", "steady_error", "toString"];
    expect(new Set(kinds.map(whyNotExercised)).size).toBe(kinds.length);
    expect(whyNotExercised("stays")).toBe("its `while` was never true");
  });
});
