import type { OperatorName } from "../ir/operators.ts";
import type { Precision } from "../lowered.ts";
import {
  atom,
  called,
  chained,
  infix,
  type Printed,
  prefix,
  type Spelling,
  selection,
} from "../print/dialect.ts";

/** One rounding per operation; `f` is Math.fround, so nothing is needed at float64. */
const rounded =
  (precision: Precision, spelling: Spelling): Spelling =>
  (operands) =>
    precision === "float32" ? atom(`f(${spelling(operands).text})`) : spelling(operands);

const wholeNumber: (sign: string) => Spelling = (sign) => (operands) =>
  ({ text: `(${infix(sign)(operands).text}) | 0`, atomic: false }) satisfies Printed;

/** How TypeScript says each operator of the language. */
export const typescriptSpelling = (precision: Precision): Readonly<Record<OperatorName, Spelling>> => ({
  add: rounded(precision, infix("+")),
  subtract: rounded(precision, infix("-")),
  multiply: rounded(precision, infix("*")),
  divide: rounded(precision, infix("/")),
  negate: prefix("-"),
  absolute: called("Math.abs"),
  squareRoot: rounded(precision, called("Math.sqrt")),
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
  toReal: rounded(precision, ([a]) => a),
  addCount: wholeNumber("+"),
  subtractCount: wholeNumber("-"),
  multiplyCount: called("Math.imul"),
  negateCount: ([a]) => ({ text: `${prefix("-")([a]).text} | 0`, atomic: false }),
  lessCount: infix("<"),
  lessEqualCount: infix("<="),
  greaterCount: infix(">"),
  greaterEqualCount: infix(">="),
  equalCount: infix("==="),
  notEqualCount: infix("!=="),
  and: chained("&&"),
  or: chained("||"),
  not: prefix("!"),
  equalFlag: infix("==="),
  notEqualFlag: infix("!=="),
  equalEnum: infix("==="),
  notEqualEnum: infix("!=="),
  selectReal: selection,
  selectCount: selection,
  selectFlag: selection,
  selectEnum: selection,
});

/** Helpers by the operator that needs them; the same names and order as in C. */
export const TYPESCRIPT_HELPERS: Partial<Record<OperatorName, readonly string[]>> = {
  isFinite: ["const is_finite = (x: number): boolean => x - x === 0;"],
  same: [
    "const same = (a: number, b: number): boolean => is_finite(a) && is_finite(b) && !(a < b) && !(a > b);",
  ],
  minimum: ["const min_of = (a: number, b: number): number => (a < b ? a : b);"],
  maximum: ["const max_of = (a: number, b: number): number => (a > b ? a : b);"],
  clamp: [
    "const clamp = (x: number, low: number, high: number): number => (x > high ? high : x >= low ? x : low);",
  ],
  toCount: [
    "const to_count = (x: number, low: number, high: number): number => (x >= high ? high : x > low ? x | 0 : low);",
  ],
};
