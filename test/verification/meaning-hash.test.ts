import { describe, expect, it } from "vitest";
import { meaningHash } from "../../verification/meaning-hash.ts";
import { free, point, scenario } from "./scenarios.ts";
import { NOWHERE } from "./traces.ts";

describe("the hash of meaning", () => {
  it("ignores places, spelling and the order of keys", () => {
    const moved = { ...NOWHERE, line: 40, endLine: 40 };
    expect(meaningHash({ a: 1, b: { value: 2, written: "2 bar", at: NOWHERE } })).toBe(
      meaningHash({ b: { at: moved, written: "200 kPa", value: 2 }, a: 1 }),
    );
  });

  it("changes with a value, also with the time in a course, whose key is also `at`", () => {
    const course = (at: number) => scenario({ target: [point(free(at), free(200))] });
    expect(meaningHash(course(1))).toBe(meaningHash(course(1)));
    expect(meaningHash(course(1))).not.toBe(meaningHash(course(2)));
    expect(meaningHash({ n: 1n })).not.toBe(meaningHash({ n: 2n }));
  });

  it("is SHA-256 of compact sorted JSON: {} gives the published-algorithm value (recomputed with coreutils)", () => {
    expect(meaningHash({ description: "text" })).toBe(
      "44136fa355b3678a1146ad16f7e8649e94fb4fc21fe77e8310c060f61caaff8a",
    );
  });
});
