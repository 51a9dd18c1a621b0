import type { Constant, Program } from "../ir/program.ts";
import { commentText } from "../print/comment-text.ts";
import { helpersFor, usedOperators } from "../print/helpers.ts";
import { type Names, namesOf } from "../print/names.ts";
import { hexFloat, isExactDecimal, shortestDecimal } from "../print/numbers.ts";
import { effectsOf } from "../validate/effects.ts";
import { cRealLiteral } from "./dialect.ts";
import { printFunction } from "./function.ts";
import { printPeriodGuards } from "./periods.ts";
import { cHelpers, NEEDS_MATH } from "./spelling.ts";
import { banner, section } from "./text.ts";

/** Refuses, when compiled, every build that could round otherwise; measured against gcc and clang, x86 and Arm. */
const assumptions = (program: Program): readonly string[] => {
  const [prefix, digits, exponent] = program.precision === "float32" ? ["FLT", 24, 128] : ["DBL", 53, 1024];
  const wanted = (macro: string, value: number | string): readonly string[] => [
    `#if defined(${macro})`,
    `#if (${macro} != ${value})`,
    `#error "${program.name} needs IEEE 754 arithmetic: ${macro} must be ${value}"`,
    "#endif",
    "#endif",
  ];
  return [
    "#if defined(__FAST_MATH__)",
    `#error "build ${program.name} without -ffast-math and with -ffp-contract=off"`,
    "#endif",
    "#if defined(__FINITE_MATH_ONLY__)",
    "#if (__FINITE_MATH_ONLY__ != 0)",
    `#error "build ${program.name} without -ffinite-math-only"`,
    "#endif",
    "#endif",
    "#if !defined(FLT_EVAL_METHOD)",
    `#error "${program.name} needs a compiler that states FLT_EVAL_METHOD (C99)"`,
    "#elif (FLT_EVAL_METHOD != 0)",
    `#error "${program.name} must be evaluated without extra precision"`,
    "#endif",
    ...wanted("FLT_RADIX", 2),
    ...wanted(`${prefix}_MANT_DIG`, digits),
    ...wanted(`${prefix}_MAX_EXP`, exponent),
    "/* No fused multiply-add, which rounds once where two roundings are meant. gcc ignores the standard pragma. */",
    "#if defined(__clang__)",
    "#pragma STDC FP_CONTRACT OFF",
    "#elif defined(__GNUC__)",
    '#pragma GCC optimize ("fp-contract=off")',
    "#else",
    "#pragma STDC FP_CONTRACT OFF",
    "#endif",
  ];
};

const printConstant = (
  program: Program,
  names: Names,
  { name, value, type, unit, doc }: Constant,
): string => {
  const isReal = type.kind === "real";
  const suffix = program.precision === "float32" ? "f" : "";
  const text = !isReal
    ? String(value)
    : isExactDecimal(value)
      ? cRealLiteral(value, program.precision)
      : `${hexFloat(value)}${suffix}`;
  const short = isReal ? shortestDecimal(value, program.precision) : String(value);
  const comment = commentText([`${short}${unit === undefined ? "" : ` ${unit}`}`, ...doc].join("; "));
  return `#define ${names.constant(name)} (${text}) /* ${comment} */`;
};

/** `<name>.c`: code only; the only values are the periods and constants of the runtime. */
export const printCode = (program: Program): string => {
  const names = namesOf(program);
  const effects = effectsOf(program.functions);
  const used = usedOperators(program);
  const isEntry = (name: string) => program.entries.some((entry) => entry.function === name);
  const blocks = program.functions.filter(({ name }) => !isEntry(name));
  const entries = program.entries.flatMap((entry) =>
    program.functions.filter(({ name }) => name === entry.function),
  );
  const constants = program.constants.map((each) => printConstant(program, names, each));
  const contents =
    "Contents: 1 assumptions  2 helpers and constants  3 blocks in run order  4 init and steps";
  const lines = [
    ...banner(
      program,
      `${program.name}.c`,
      `the controller; every + - * / below rounds once, at ${program.precision}`,
      [contents],
    ),
    `#include "${program.name}.h"`,
    "",
    "#include <float.h>",
    ...(NEEDS_MATH.some((each) => used.has(each)) ? ["#include <math.h>"] : []),
    ...section("1 assumptions", [...printPeriodGuards(program, names), ...assumptions(program)]),
    ...section(
      "2 helpers and constants: comparisons, not fminf or fmaxf, so NaN and -0 act alike everywhere",
      [...constants, ...helpersFor(used, cHelpers(program.precision)).flat()],
    ),
    ...section(
      "3 blocks",
      blocks.flatMap((each) => printFunction(program, names, each, effects)),
    ),
    ...section(
      "4 init and steps",
      entries.flatMap((each) => printFunction(program, names, each, effects)),
    ),
  ];
  return `${lines.join("\n")}\n`;
};
