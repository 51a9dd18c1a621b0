import fc from "fast-check";
import { describe, expect, test, vi } from "vitest";
import { ARITHMETIC, type Precision, type Program, printC, WARNINGS } from "../../generator/index.ts";
import { compileSpec, exampleSpec, readSpec, runtimeText } from "../agreement/compile-spec.ts";
import { randomSpec } from "../agreement/random-spec.ts";
import { SKARN24, SMALLEST } from "../support/smallest.ts";
import { cannotUse } from "../support/tool.ts";
import { runIn, writeAll } from "./native.ts";
import { specimenProgram } from "./specimen/lowered.ts";

/** A checker takes seconds; several at once on a busy machine take minutes. */
vi.setConfig({ testTimeout: 600_000 });

const CLEAN = { code: 0, said: "" };

const runtime = runtimeText();
const example = (file: string, precision: Precision) => () =>
  compileSpec(exampleSpec(file), runtime, precision);
const random = fc.sample(randomSpec, { seed: 77, numRuns: 4 });

const PROGRAMS: readonly (readonly [string, () => Program])[] = [
  ["specimen float32", () => specimenProgram()],
  ["specimen float64", () => specimenProgram({ precision: "float64" })],
  ["smallest float32", example(SMALLEST, "float32")],
  ["smallest float64", example(SMALLEST, "float64")],
  ["skarn24 float32", example(SKARN24, "float32")],
  ["skarn24 float64", example(SKARN24, "float64")],
  ...random.map((text, i) => [`random spec ${i}`, () => compileSpec(readSpec(text), runtime)] as const),
];

const sourcesOf = ({ name }: Program): readonly string[] => [`${name}.c`, `${name}_cal.c`];
const compile = (compiler: string, folder: string, program: Program, flags: readonly string[]) =>
  runIn(folder, compiler, [...ARITHMETIC, ...flags, "-c", ...sourcesOf(program)]);

describe.each(PROGRAMS)("generated C of %s", (_, make) => {
  const program = make();
  // gcc only: clang 14 does not know the flag, and at float64 it refuses every literal
  const suffixes = program.precision === "float32" ? ["-Wunsuffixed-float-constants"] : [];

  test("is clean under gcc", () => {
    const folder = writeAll(printC(program));
    expect(compile("gcc", folder, program, ["-O2", ...WARNINGS, ...suffixes])).toEqual(CLEAN);
  });
  test("is clean under gcc -fanalyzer", () => {
    expect(compile("gcc", writeAll(printC(program)), program, ["-O1", "-fanalyzer", "-Werror"])).toEqual(
      CLEAN,
    );
  });
  test.skipIf(cannotUse("clang"))("is clean under clang", () => {
    expect(compile("clang", writeAll(printC(program)), program, ["-O2", ...WARNINGS])).toEqual(CLEAN);
  });
  test.skipIf(cannotUse("cppcheck"))("has no finding of cppcheck and its MISRA addon", () => {
    const flags =
      "--std=c99 --enable=all --suppress=missingIncludeSystem --suppress=unusedFunction --suppress=unmatchedSuppression";
    // FLT_EVAL_METHOD: without it the guard at the head makes cppcheck skip the file
    const args = [
      ...flags.split(" "),
      "-DFLT_EVAL_METHOD=0",
      "--addon=misra",
      "--error-exitcode=1",
      "-q",
      "-I.",
    ];
    expect(runIn(writeAll(printC(program)), "cppcheck", [...args, ...sourcesOf(program)])).toEqual(CLEAN);
  });
});

describe("builds that would round differently", () => {
  const program = specimenProgram();

  test.each(["-ffast-math", "-ffinite-math-only", "-mfpmath=387"])(
    "gcc %s is refused at compile time",
    (flag) => {
      const folder = writeAll(printC(program));
      const { code, said } = runIn(folder, "gcc", ["-std=c99", "-c", flag, "specimen.c"]);
      expect(code).not.toBe(0);
      expect(said).toContain("#error");
    },
  );

  const fused = (compiler: string): number => {
    const folder = writeAll(printC(program));
    const built = runIn(folder, compiler, ["-O2", "-mfma", "-S", "-o", "out.s", "specimen.c"]);
    expect(built.code, built.said).toBe(0);
    const { said } = runIn(folder, "grep", ["-c", "vfm", "out.s"]);
    return Number(said);
  };
  test("gcc makes no fused multiply-add, even in its own dialect with -mfma", () =>
    expect(fused("gcc")).toBe(0));
  test.skipIf(cannotUse("clang"))("clang makes none either", () => expect(fused("clang")).toBe(0));
});

describe("the Makefile", () => {
  test("builds the library with the host's compiler", () => {
    const folder = writeAll(printC(specimenProgram()));
    const { code, said } = runIn(folder, "make", ["CC=gcc"]);
    expect(code, said).toBe(0);
    expect(runIn(folder, "nm", ["libspecimen.a"]).said).toContain("T specimen_step_slow");
  });
  test("the library has no data of its own that could change", () => {
    const folder = writeAll(printC(specimenProgram()));
    expect(runIn(folder, "make", ["CC=gcc"]).code).toBe(0);
    expect(runIn(folder, "nm", ["specimen.o"]).said).not.toMatch(/ [bBdDC] /);
  });
});
