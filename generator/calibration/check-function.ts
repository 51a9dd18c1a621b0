import { rounding } from "../interpret/operations.ts";
import { COUNT, type Expression, type Place, REAL } from "../ir/expression.ts";
import type { FunctionDefinition, Program } from "../ir/program.ts";
import type { Statement } from "../ir/statement.ts";
import { eachCallOf } from "../ir/walk.ts";
import { type Layout, layoutOf } from "../layout/layout.ts";
import { type Leaf, leavesOf } from "../layout/leaves.ts";
import type { CalibrationInfo } from "../lowered.ts";
import { CHECK_CALIBRATION } from "../print/names.ts";
import {
  apply,
  assign,
  built,
  count,
  declare,
  FIRST_NOT_RISING,
  FIRST_OUTSIDE,
  firstNotRising,
  firstOutside,
  local,
  outside,
  real,
  when,
} from "./first-bad.ts";

const LARGEST = { float32: 2 ** 127 * (2 - 2 ** -23), float64: Number.MAX_VALUE } as const;
const ROOT = "calibration";
const bad = local("bad", COUNT);

/** Place of a leaf; a table's part is one field whose name holds a dot. */
const placeOf = (layout: Layout, leaf: Leaf): Place => {
  const fields: string[] = [];
  let struct = layout.structs.find(({ name }) => name === layout.calibrationStruct);
  for (const printed of leaf.printed) {
    const field = struct?.fields.find((each) => each.printed === printed);
    fields.push(field?.name ?? printed);
    const type = field?.type;
    struct = layout.structs.find(({ name }) => type?.kind === "struct" && name === type.name);
  }
  return { root: ROOT, fields };
};

const callOn = (name: string, leaf: Leaf, place: Place, extra: readonly Expression[]): Statement =>
  assign("bad", {
    kind: "call",
    function: name,
    arguments: [
      { kind: "array", place, size: leaf.type.kind === "array" ? leaf.type.size : 0 },
      ...[...extra, count(leaf.index), bad].map((value) => ({ kind: "value", value }) as const),
    ],
    type: COUNT,
    origin: built,
  });

const checkOf = (
  leaf: Leaf,
  place: Place,
  info: CalibrationInfo | undefined,
  round: (exact: number) => number,
  largest: number,
): readonly Statement[] => {
  const [low, high] = [round(info?.low ?? -largest), round(info?.high ?? largest)];
  const isBounded = info?.low !== undefined || info?.high !== undefined;
  const set = assign("bad", count(leaf.index));
  switch (leaf.type.kind) {
    case "array":
      // Later statements win, so the order of an axis is looked at before its values.
      return [
        ...(info?.increasing ? [callOn(FIRST_NOT_RISING, leaf, place, [])] : []),
        callOn(FIRST_OUTSIDE, leaf, place, [real(low), real(high)]),
      ];
    case "real": {
      const value: Expression = { kind: "field", place, type: REAL, origin: built };
      return [
        when(isBounded ? outside(value, real(low), real(high)) : apply("not", apply("isFinite", value)), set),
      ];
    }
    case "count": {
      const value: Expression = { kind: "field", place, type: COUNT, origin: built };
      const [least, most] = [count(info?.low ?? 0), count(info?.high ?? 2 ** 24)];
      return [when(apply("or", apply("lessCount", value, least), apply("greaterCount", value, most)), set)];
    }
    default:
      return [];
  }
};

/**
 * Adds `checkCalibration`: the index of the first calibration value that is not finite, out of its declared range, or
 * out of order on its axis; -1 when all are good. Indices count the values in the order of the struct. Counts without a
 * declared range must lie within 0 .. 2^24.
 */
export const addCalibrationCheck = (program: Program): Program => {
  const layout = layoutOf(program);
  if (program.calibrationStruct === undefined) {
    return program;
  }
  const round = rounding(program.precision);
  const checks = leavesOf(layout, program.calibrationStruct)
    .map((leaf) => {
      const info = program.calibrationInfo[leaf.runtime.join(".")];
      return checkOf(leaf, placeOf(layout, leaf), info, round, LARGEST[program.precision]);
    })
    .reverse()
    .flat();
  const [first, ...others] = checks;
  const check: FunctionDefinition = {
    name: CHECK_CALIBRATION,
    parameters: [{ name: ROOT, type: { kind: "struct", name: program.calibrationStruct } }],
    returns: COUNT,
    doc: ["Looks at every calibration value: finite, within its range, axes rising."],
    at: built.runtime,
    body: [
      declare("bad", COUNT, count(-1)),
      ...(first === undefined
        ? []
        : [
            {
              ...first,
              comments: ["From the last value to the first, so that the first bad one is reported."],
            },
          ]),
      ...others,
    ],
    result: bad,
    resultComments: [],
  };
  const called = new Set<string>();
  eachCallOf(check, (call) => called.add(call.function));
  const helpers = [firstOutside, firstNotRising].filter(({ name }) => called.has(name));
  return {
    ...program,
    functions: [...helpers, ...program.functions, check],
    entries: [
      ...program.entries,
      {
        function: CHECK_CALIBRATION,
        kind: "check",
        when: "Call it once after the calibration was loaded or changed. Returns the index of the first bad value, or -1; run no step unless it is -1.",
      },
    ],
  };
};
