import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  ARITHMETIC,
  generatedModule,
  getAt,
  interpretedModule,
  layoutOf,
  leavesOf,
  loadTypeScript,
  type Program,
  printC,
  printTypeScript,
  setAt,
} from "../../generator/index.ts";
import { compileSpec, exampleSpec, readSpec, runtimeText } from "../agreement/compile-spec.ts";
import { randomSpec } from "../agreement/random-spec.ts";
import { SKARN24 } from "../support/smallest.ts";
import { runIn, writeAll } from "./native.ts";

type Edit = readonly [path: string, value: number];

/** One broken relation: what is changed, and the value that the check must name. */
const BROKEN: readonly (readonly [name: string, edits: readonly Edit[], offender: string])[] = [
  ...[
    "engineSpeed",
    "accelerator",
    "boostPressure",
    "ambientPressure",
    "chargeTemperature",
    "turboSpeed",
  ].flatMap((signal) => [
    [`${signal} believed over nothing`, [[`${signal}.high`, Number.NaN]], `${signal}.high`] as const,
    [
      `${signal} with its range swapped`,
      [
        [`${signal}.low`, 200],
        [`${signal}.high`, 150],
      ],
      // an accelerator of 200 is out of its own range already
      signal === "accelerator" ? `${signal}.low` : `${signal}.high`,
    ] as const,
  ]),
  [
    "an accelerator range of one point",
    [
      ["accelerator.low", 0.5],
      ["accelerator.high", 0.5],
    ],
    "accelerator.high",
  ],
  [
    "openings swapped",
    [
      ["openingLowRatio", 0.5],
      ["openingHighRatio", 0.02],
    ],
    "openingHighRatio",
  ],
  ["openings that are equal", [["openingHighRatio", 0]], "openingHighRatio"],
  ["a gate that opens less than its safe opening", [["openingHighRatio", 0.5]], "safeOpeningRatio"],
  [
    "a safe opening below the gate's range",
    [
      ["openingLowRatio", 0.2],
      ["safeOpeningRatio", 0.1],
    ],
    "safeOpeningRatio",
  ],
  ["a rest opening below the gate's range", [["openingLowRatio", 0.4]], "restOpeningRatio"],
  [
    "a rest opening above the gate's range",
    [
      ["openingHighRatio", 0.5],
      ["safeOpeningRatio", 0.5],
      ["restOpeningRatio", 0.6],
    ],
    "restOpeningRatio",
  ],
  [
    "trim limits swapped",
    [
      ["trimLow", 220],
      ["trimHigh", -220],
    ],
    "trimHigh",
  ],
  ["trim limits that are equal", [["trimHigh", -220]], "trimHigh"],
  ["a speed ceiling above the limit", [["speedCeilingRpm", 165_001]], "speedCeilingRpm"],
  ["a release at the ceiling", [["speedCeilingRpm", 145_000]], "tripReleaseBelowRpm"],
  ["a release above the ceiling", [["tripReleaseBelowRpm", 164_000]], "tripReleaseBelowRpm"],
  ["a negative proportional gain", [["proportionalGain", -1]], "proportionalGain"],
  ["a negative integral gain", [["integralGain", -1]], "integralGain"],
  ["a negative derivative gain", [["derivativeGain", -1]], "derivativeGain"],
];

const example = () => compileSpec(exampleSpec(SKARN24), runtimeText());
const leafOf = (program: Program, path: string) => {
  const leaf = leavesOf(layoutOf(program), "Calibration").find(({ runtime }) => runtime.join(".") === path);
  if (leaf === undefined) throw new Error(`the example has no ${path}`);
  return leaf;
};

const checkIn = (
  program: Program,
  module: ReturnType<typeof interpretedModule>,
  edits: readonly Edit[],
): number => {
  const calibration = module.createCalibration();
  for (const [path, value] of edits)
    setAt(calibration, leafOf(program, path)[module.naming], Math.fround(value));
  return module.bind("checkCalibration", { Calibration: calibration })() as number;
};

const cNumber = (value: number): string =>
  Number.isNaN(value) ? "(0.0f / 0.0f)" : `${value}f`.replace(/^(-?\d+)f$/, "$1.0f");

/** The check's results in C, one per list of edits. */
const checksInC = (program: Program, lists: readonly (readonly Edit[])[]): readonly number[] => {
  const { name } = program;
  const blocks = lists.map((edits) =>
    [
      `c = ${name}_calibration_default;`,
      ...edits.map(([path, value]) => `c.${leafOf(program, path).printed.join(".")} = ${cNumber(value)};`),
      `printf("%d\\n", (int)${name}_check_calibration(&c));`,
    ].join("\n"),
  );
  const main = `#include <stdio.h>\n#include "${name}.h"\nint main(void) {\n${name}_calibration_t c;\n${blocks.join("\n")}\nreturn 0;\n}\n`;
  const folder = writeAll(new Map([...printC(program), ["main.c", main]]));
  const sources = [`${name}.c`, `${name}_cal.c`, "main.c"];
  expect(runIn(folder, "gcc", [...ARITHMETIC, "-o", "main", ...sources])).toEqual({ code: 0, said: "" });
  return runIn(folder, "./main", []).said.trim().split("\n").map(Number);
};

describe("calibration values that contradict each other", () => {
  const program = example();
  const interpreted = interpretedModule(program);
  const expected = BROKEN.map(([, , offender]) => leafOf(program, offender).index);

  test.each(BROKEN)("%s: the interpreter names the offender", (_, edits, offender) => {
    expect(checkIn(program, interpreted, edits)).toBe(leafOf(program, offender).index);
  });
  test("generated TypeScript names the same", async () => {
    const module = generatedModule(layoutOf(program), await loadTypeScript(printTypeScript(program)));
    expect(BROKEN.map(([, edits]) => checkIn(program, module, edits))).toEqual(expected);
  });
  test("C names the same, and nothing in the calibration as specified", () => {
    expect(checksInC(program, [...BROKEN.map(([, edits]) => edits), []])).toEqual([...expected, -1]);
  });
  test("values that only touch where they may are good", () => {
    const touching: readonly Edit[] = [
      ["speedCeilingRpm", 165_000],
      ["restOpeningRatio", 0],
      ["proportionalGain", 0],
    ];
    expect(checkIn(program, interpreted, touching)).toBe(-1);
  });
});

describe("the calibration of a valid spec", () => {
  test.each(fc.sample(randomSpec, { seed: 5, numRuns: 25 }))("has nothing to refuse", (text) => {
    const program = compileSpec(readSpec(text), runtimeText());
    expect(checkIn(program, interpretedModule(program), [])).toBe(-1);
  });
  test("is not refused when float32 rounds two different values to one", () => {
    const spec = exampleSpec(SKARN24);
    const { actuator } = spec.controller;
    const opening = { low: { ...actuator.opening.low, value: 1 - 2 ** -30 }, high: actuator.opening.high };
    const narrow = {
      ...spec,
      controller: {
        ...spec.controller,
        actuator: { ...actuator, opening, restOpening: { ...actuator.restOpening, value: 1 - 2 ** -31 } },
      },
    };
    for (const precision of ["float32", "float64"] as const) {
      const program = compileSpec(narrow, runtimeText(), precision);
      expect(checkIn(program, interpretedModule(program), [])).toBe(-1);
    }
    expect(
      getAt(interpretedModule(compileSpec(narrow, runtimeText())).createCalibration(), ["openingLowRatio"]),
    ).toBe(1);
  });
});
