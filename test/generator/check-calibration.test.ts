import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  generatedModule,
  getAt,
  interpretedModule,
  layoutOf,
  leavesOf,
  loadTypeScript,
  printTypeScript,
  type StructObject,
  setAt,
} from "../../generator/index.ts";
import { specimenProgram } from "./specimen/lowered.ts";

// leaves of the specimen: curve_axis 0..2, curve_values 3..5, limits.low 6, limits.high 7, steps 8, armed 9
const program = specimenProgram();
const reference = interpretedModule(program);

const check = (change: (calibration: StructObject) => void): number => {
  const calibration = reference.createCalibration();
  change(calibration);
  return reference.bind("checkCalibration", { Calibration: calibration })() as number;
};
const put = (path: readonly string[], value: number) => (calibration: StructObject) =>
  setAt(calibration, path, value);
const putAt = (path: readonly string[], i: number, value: number) => (calibration: StructObject) => {
  (getAt(calibration, path) as number[])[i] = value;
};

describe("the generated calibration check", () => {
  test("finds nothing in the calibration as specified", () => expect(check(() => undefined)).toBe(-1));
  test.each([
    ["not a number", put(["limits", "high"], Number.NaN), 7],
    ["infinite", put(["limits", "high"], Number.POSITIVE_INFINITY), 7],
    ["above its range", put(["limits", "high"], 1001), 7],
    ["below its range", put(["limits", "low"], -101), 6],
    ["a count above its range", put(["steps"], 1001), 8],
    ["a negative count", put(["steps"], -1), 8],
    ["infinite inside an array", putAt(["curve", "values"], 1, Number.NEGATIVE_INFINITY), 4],
    ["an axis that stands still", putAt(["curve", "axis"], 1, 0), 1],
    ["an axis that falls", putAt(["curve", "axis"], 2, 49), 2],
  ])("%s: gives its index", (_, change, index) => expect(check(change)).toBe(index));
  test("the first bad value is reported", () => {
    const change = (calibration: StructObject) => {
      put(["steps"], -1)(calibration);
      putAt(["curve", "values"], 2, Number.NaN)(calibration);
    };
    expect(check(change)).toBe(5);
  });
  test("the ends of a range are allowed", () => {
    expect(check(put(["limits", "high"], 1000))).toBe(-1);
    expect(check(put(["limits", "low"], -100))).toBe(-1);
  });

  test("generated TypeScript gives the same index for any broken value", async () => {
    const twin = generatedModule(layoutOf(program), await loadTypeScript(printTypeScript(program)));
    const leaves = leavesOf(layoutOf(program), "Calibration").filter(({ type }) => type.kind === "real");
    fc.assert(
      fc.property(fc.nat(leaves.length - 1), fc.float(), (i, value) => {
        const results = [reference, twin].map((module) => {
          const calibration = module.createCalibration();
          setAt(calibration, leaves[i][module.naming], value);
          return module.bind("checkCalibration", { Calibration: calibration })();
        });
        expect(results[0]).toBe(results[1]);
      }),
    );
  });
});
