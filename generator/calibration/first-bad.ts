import {
  COUNT,
  type Expression,
  FLAG,
  type Origin,
  type Place,
  REAL,
  type ValueType,
} from "../ir/expression.ts";
import { OPERATORS, type OperatorName } from "../ir/operators.ts";
import type { FunctionDefinition } from "../ir/program.ts";
import type { Statement } from "../ir/statement.ts";

// Code of the calibration check that does not depend on the spec, as IR, so that every target gets the same.

export const FIRST_OUTSIDE = "firstOutside";
export const FIRST_NOT_RISING = "firstNotRising";

const BUILT = { file: "generator/calibration/first-bad.ts", line: 1, column: 1, endLine: 1, endColumn: 1 };
export const built: Origin = { runtime: BUILT };

export const count = (value: number): Expression => ({ kind: "count", value, type: COUNT, origin: built });
export const real = (value: number): Expression => ({ kind: "real", value, type: REAL, origin: built });
const flag = (value: boolean): Expression => ({ kind: "flag", value, type: FLAG, origin: built });
export const local = (name: string, type: ValueType): Expression => ({
  kind: "local",
  name,
  type,
  origin: built,
});

export const apply = (operator: OperatorName, ...operands: readonly Expression[]): Expression => {
  const { gives } = OPERATORS[operator];
  const type = gives === "flag" ? FLAG : gives === "count" ? COUNT : REAL;
  return { kind: "operation", operator, operands, type, origin: built };
};

export const common = { comments: [], origin: built } as const;

export const assign = (name: string, value: Expression): Statement => ({
  kind: "assign",
  target: { kind: "local", name },
  value,
  ...common,
});

export const declare = (name: string, type: ValueType, value: Expression): Statement => ({
  kind: "local",
  name,
  type,
  mutable: true,
  value,
  ...common,
});

export const when = (condition: Expression, ...whenTrue: readonly Statement[]): Statement => ({
  kind: "if",
  condition,
  whenTrue,
  whenFalse: [],
  ...common,
});

const VALUES: Place = { root: "values", fields: [] };
const at = (index: Expression): Expression => ({
  kind: "element",
  place: VALUES,
  index,
  type: REAL,
  origin: built,
});
const i = local("i", COUNT);

/** Not within the bounds; true for NaN. */
export const outside = (value: Expression, low: Expression, high: Expression): Expression =>
  apply("not", apply("and", apply("greaterEqual", value, low), apply("lessEqual", value, high)));

const search = (
  name: string,
  doc: string,
  from: number,
  bad: Expression,
  extra: readonly string[],
): FunctionDefinition => ({
  name,
  parameters: [
    { name: "values", type: { kind: "array", counted: true } },
    ...extra.map((each) => ({ name: each, type: REAL })),
    { name: "offset", type: COUNT },
    { name: "otherwise", type: COUNT },
  ],
  returns: COUNT,
  doc: [doc],
  at: BUILT,
  body: [
    declare("bad", COUNT, local("otherwise", COUNT)),
    declare("found", FLAG, flag(false)),
    {
      kind: "for",
      variable: "i",
      from: count(from),
      below: { kind: "length", place: VALUES, type: COUNT, origin: built },
      body: [
        when(
          apply("and", apply("not", local("found", FLAG)), bad),
          assign("bad", apply("addCount", local("offset", COUNT), i)),
          assign("found", flag(true)),
        ),
      ],
      ...common,
    },
  ],
  result: local("bad", COUNT),
  resultComments: [],
});

export const firstOutside: FunctionDefinition = search(
  FIRST_OUTSIDE,
  "Index of the first value outside low .. high or not a number, counted from offset; else otherwise.",
  0,
  outside(at(i), local("low", REAL), local("high", REAL)),
  ["low", "high"],
);

export const firstNotRising: FunctionDefinition = search(
  FIRST_NOT_RISING,
  "Index of the first value not greater than the one before it, counted from offset; else otherwise.",
  1,
  apply("not", apply("greater", at(i), at(apply("subtractCount", i, count(1))))),
  [],
);
