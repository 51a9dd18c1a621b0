import type { OperatorName } from "../ir/operators.ts";
import type { Precision } from "../lowered.ts";
import { atom, called, chained, infix, operand, prefix, type Spelling, selection } from "../print/dialect.ts";

/** How C says each operator of the language. */
export const cSpelling = (precision: Precision): Readonly<Record<OperatorName, Spelling>> => {
  const real = cReal(precision);
  return {
    add: infix("+"),
    subtract: infix("-"),
    multiply: infix("*"),
    divide: infix("/"),
    negate: prefix("-"),
    absolute: called(precision === "float32" ? "fabsf" : "fabs"),
    squareRoot: called(precision === "float32" ? "sqrtf" : "sqrt"),
    minimum: called("min_of"),
    maximum: called("max_of"),
    clamp: called("clamp"),
    less: infix("<"),
    lessEqual: infix("<="),
    greater: infix(">"),
    greaterEqual: infix(">="),
    same: called("same"),
    isFinite: called("is_finite"),
    toCount: called("to_count"),
    toReal: ([a]) => atom(`(${real})${operand(a)}`),
    addCount: infix("+"),
    subtractCount: infix("-"),
    multiplyCount: infix("*"),
    negateCount: prefix("-"),
    lessCount: infix("<"),
    lessEqualCount: infix("<="),
    greaterCount: infix(">"),
    greaterEqualCount: infix(">="),
    equalCount: infix("=="),
    notEqualCount: infix("!="),
    and: chained("&&"),
    or: chained("||"),
    not: prefix("!"),
    equalFlag: called("both_or_none"),
    notEqualFlag: called("one_of_two"),
    equalEnum: infix("=="),
    notEqualEnum: infix("!="),
    selectReal: selection,
    selectCount: selection,
    selectFlag: selection,
    selectEnum: selection,
  };
};

export const cReal = (precision: Precision): string => (precision === "float32" ? "float" : "double");

const helper = (signature: string, ...body: readonly string[]): readonly string[] => [
  "",
  `static ${signature}`,
  "{",
  ...body.map((line) => `    ${line}`),
  "}",
];

/** Helpers by the operator that needs them: comparisons, never fminf or fmaxf, and never a bare conversion. */
export const cHelpers = (precision: Precision): Partial<Record<OperatorName, readonly string[]>> => {
  const real = cReal(precision);
  const [absolute, largest] = precision === "float32" ? ["fabsf", "FLT_MAX"] : ["fabs", "DBL_MAX"];
  return {
    isFinite: helper(`bool is_finite(${real} x)`, `return ${absolute}(x) <= ${largest};`),
    same: helper(
      `bool same(${real} a, ${real} b)`,
      "return is_finite(a) && is_finite(b) && !(a < b) && !(a > b);",
    ),
    minimum: helper(`${real} min_of(${real} a, ${real} b)`, "return (a < b) ? a : b;"),
    maximum: helper(`${real} max_of(${real} a, ${real} b)`, "return (a > b) ? a : b;"),
    clamp: helper(
      `${real} clamp(${real} x, ${real} low, ${real} high)`,
      "return (x > high) ? high : ((x >= low) ? x : low);",
    ),
    equalFlag: helper("bool both_or_none(bool a, bool b)", "return a == b;"),
    notEqualFlag: helper("bool one_of_two(bool a, bool b)", "return a != b;"),
    toCount: helper(
      `int32_t to_count(${real} x, int32_t low, int32_t high)`,
      `return (x >= (${real})high) ? high : ((x > (${real})low) ? (int32_t)x : low);`,
    ),
  };
};

/** Operators whose C needs <math.h>. */
export const NEEDS_MATH: readonly OperatorName[] = ["absolute", "squareRoot", "isFinite"];
