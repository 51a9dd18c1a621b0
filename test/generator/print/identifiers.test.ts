import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { safeFunctionName, safeName, snakeCase, stemFrom } from "../../../generator/print/identifiers.ts";

describe("names from a spec", () => {
  test("any text becomes an identifier of C and TypeScript", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary", maxLength: 80 }), (name) => {
        expect(stemFrom(name)).toMatch(/^[a-z](?:_?[a-z0-9])*$/);
        expect(stemFrom(name).length).toBeLessThanOrEqual(30);
      }),
      { numRuns: 2000 },
    );
  });
  test.each([
    ["skarn24_boost", "skarn24_boost"],
    ["Skarn 24", "skarn_24"],
    ["24", "loop_24"],
    ["int", "int_loop"],
    ["class", "class_loop"],
    ["exit", "exit_loop"],
    ["*/ #include", "include"],
    ["", "loop"],
    ["__proto__", "proto"],
  ])("%j becomes %s", (name, stem) => expect(stemFrom(name)).toBe(stem));
});

describe("names from the runtime", () => {
  test.each([
    ["boostPressureKpa", "boost_pressure_kpa"],
    ["gateArea.axis", "gate_area_axis"],
    ["pressureRateKpaPerS", "pressure_rate_kpa_per_s"],
    ["FastState", "fast_state"],
    ["Table2", "table2"],
    ["stepS", "step_s"],
  ])("%s prints as %s", (name, printed) => expect(snakeCase(name)).toBe(printed));
  test("a word of either language gets an underscore", () => {
    expect([safeName("in"), safeName("register"), safeName("level")]).toEqual(["in_", "register_", "level"]);
  });
  test("a function does not hide one of the C library", () => {
    expect([safeFunctionName("round"), safeName("round")]).toEqual(["round_", "round"]);
  });
});
