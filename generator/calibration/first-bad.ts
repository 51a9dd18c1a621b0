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
import type { FunctionDefinition, Parameter } from "../ir/program.ts";
import type { Statement } from "../ir/statement.ts";

// Code of the calibration check that does not depend on the spec, as IR, so that every target gets the same.

export const BAD_REAL = "badReal";
export const BAD_COUNT = "badCount";
export const BAD_ARRAY = "badArray";
export const BAD_AXIS = "badAxis";
export const BAD_ORDER = "badOrder";
export const BAD_RISE = "badRise";

const BUILT = { file: "generator/calibration/first-bad.ts", line: 1, column: 1, endLine: 1, endColumn: 1 };
export const built: Origin = { runtime: BUILT };

export const count = (value: number): Expression => ({ kind: "count", value, type: COUNT, origin: built });
export const real = (value: number): Expression => ({ kind: "real", value, type: REAL, origin: built });
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

const SO_FAR = "soFar";
const soFar = local(SO_FAR, COUNT);
const isGoodYet = (name: string) => apply("lessCount", local(name, COUNT), count(0));

const definition = (
  name: string,
  doc: string,
  parameters: readonly Parameter[],
  body: readonly Statement[],
  result: Expression,
): FunctionDefinition => ({
  name,
  parameters: [...parameters, { name: "index", type: COUNT }, { name: SO_FAR, type: COUNT }],
  returns: COUNT,
  doc: [doc],
  at: BUILT,
  body,
  result,
  resultComments: [],
});

const single = (
  name: string,
  doc: string,
  parameters: readonly string[],
  type: ValueType,
  bad: Expression,
): FunctionDefinition =>
  definition(
    name,
    doc,
    parameters.map((each) => ({ name: each, type })),
    [],
    apply("selectCount", apply("and", isGoodYet(SO_FAR), bad), local("index", COUNT), soFar),
  );

const WITHIN = "The index when the value is the first bad one: not a number, or outside low .. high.";
const BOUNDED = ["value", "low", "high"];

export const badReal = single(
  BAD_REAL,
  WITHIN,
  BOUNDED,
  REAL,
  outside(local("value", REAL), local("low", REAL), local("high", REAL)),
);

export const badCount = single(
  BAD_COUNT,
  WITHIN,
  BOUNDED,
  COUNT,
  apply(
    "or",
    apply("lessCount", local("value", COUNT), local("low", COUNT)),
    apply("greaterCount", local("value", COUNT), local("high", COUNT)),
  ),
);

const PAIR = ["lower", "upper"];
const [lower, upper] = PAIR.map((name) => local(name, REAL));

export const badOrder = single(
  BAD_ORDER,
  "The index when its value is the first bad one: lower is greater than upper.",
  PAIR,
  REAL,
  apply("not", apply("lessEqual", lower, upper)),
);

export const badRise = single(
  BAD_RISE,
  "The index when its value is the first bad one: lower is not less than upper.",
  PAIR,
  REAL,
  apply("not", apply("less", lower, upper)),
);

const search = (
  name: string,
  doc: string,
  from: number,
  isBad: Expression,
  bounds: readonly Parameter[],
): FunctionDefinition =>
  definition(
    name,
    doc,
    [{ name: "values", type: { kind: "array", counted: true } }, ...bounds],
    [
      declare("bad", COUNT, soFar),
      {
        kind: "for",
        variable: "i",
        from: count(from),
        below: { kind: "length", place: VALUES, type: COUNT, origin: built },
        body: [
          when(
            apply("and", isGoodYet("bad"), isBad),
            assign("bad", apply("addCount", local("index", COUNT), i)),
          ),
        ],
        ...common,
      },
    ],
    local("bad", COUNT),
  );

export const badArray: FunctionDefinition = search(
  BAD_ARRAY,
  "As bad_real, for an array whose first value has the index.",
  0,
  outside(at(i), local("low", REAL), local("high", REAL)),
  [
    { name: "low", type: REAL },
    { name: "high", type: REAL },
  ],
);

export const badAxis: FunctionDefinition = search(
  BAD_AXIS,
  "Index of the first value of an axis that is not greater than the one before it.",
  1,
  apply("not", apply("greater", at(i), at(apply("subtractCount", i, count(1))))),
  [],
);
