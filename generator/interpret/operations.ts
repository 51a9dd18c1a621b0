import type { OperatorName } from "../ir/operators.ts";
import type { Precision } from "../lowered.ts";

/** What an expression gives: a Real or Count, a Flag, or the name of an enumeration's member. */
export type Value = number | boolean | string;

export const rounding = (precision: Precision): ((exact: number) => number) =>
  precision === "float32" ? Math.fround : (exact) => exact;

/** A function of as many operands as the operator takes; the table's key fixes their types. */
type Operation = (...operands: never[]) => Value;

/**
 * The reference meaning of every operator. Rounding a double result of + - * / or sqrt once to float32 equals the
 * float32 operation: 53 >= 2 * 24 + 2 bits (Figueroa 1995, from memory), subnormal results included.
 */
export const operations = (precision: Precision): Record<OperatorName, Operation> => {
  const round = rounding(precision);
  const finite = (a: number): boolean => a - a === 0;
  return {
    add: (a: number, b: number) => round(a + b),
    subtract: (a: number, b: number) => round(a - b),
    multiply: (a: number, b: number) => round(a * b),
    divide: (a: number, b: number) => round(a / b),
    negate: (a: number) => -a,
    absolute: (a: number) => Math.abs(a),
    squareRoot: (a: number) => round(Math.sqrt(a)),
    minimum: (a: number, b: number) => (a < b ? a : b),
    maximum: (a: number, b: number) => (a > b ? a : b),
    clamp: (x: number, low: number, high: number) => (x > high ? high : x >= low ? x : low),
    less: (a: number, b: number) => a < b,
    lessEqual: (a: number, b: number) => a <= b,
    greater: (a: number, b: number) => a > b,
    greaterEqual: (a: number, b: number) => a >= b,
    same: (a: number, b: number) => finite(a) && finite(b) && !(a < b) && !(a > b),
    isFinite: (a: number) => finite(a),
    toCount: (x: number, low: number, high: number) => (x >= high ? high : x > low ? x | 0 : low),
    toReal: (a: number) => round(a),

    addCount: (a: number, b: number) => (a + b) | 0,
    subtractCount: (a: number, b: number) => (a - b) | 0,
    multiplyCount: (a: number, b: number) => Math.imul(a, b),
    negateCount: (a: number) => -a | 0,
    lessCount: (a: number, b: number) => a < b,
    lessEqualCount: (a: number, b: number) => a <= b,
    greaterCount: (a: number, b: number) => a > b,
    greaterEqualCount: (a: number, b: number) => a >= b,
    equalCount: (a: number, b: number) => a === b,
    notEqualCount: (a: number, b: number) => a !== b,

    and: (a: boolean, b: boolean) => a && b,
    or: (a: boolean, b: boolean) => a || b,
    not: (a: boolean) => !a,
    equalFlag: (a: boolean, b: boolean) => a === b,
    notEqualFlag: (a: boolean, b: boolean) => a !== b,
    equalEnum: (a: string, b: string) => a === b,
    notEqualEnum: (a: string, b: string) => a !== b,

    selectReal: (c: boolean, a: number, b: number) => (c ? a : b),
    selectCount: (c: boolean, a: number, b: number) => (c ? a : b),
    selectFlag: (c: boolean, a: boolean, b: boolean) => (c ? a : b),
    selectEnum: (c: boolean, a: string, b: string) => (c ? a : b),
  };
};

export const evaluate = (operation: Operation, operands: readonly Value[]): Value =>
  (operation as (...values: readonly Value[]) => Value)(...operands);
