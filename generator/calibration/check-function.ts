import { rounding } from "../interpret/operations.ts";
import { type Argument, COUNT, type Expression, type Place, REAL, type ValueType } from "../ir/expression.ts";
import type { FunctionDefinition, Program } from "../ir/program.ts";
import type { Statement } from "../ir/statement.ts";
import { eachCallOf } from "../ir/walk.ts";
import { type Layout, layoutOf } from "../layout/layout.ts";
import { type Leaf, leavesOf } from "../layout/leaves.ts";
import type { CalibrationInfo, CalibrationValue, Comparison, Precision } from "../lowered.ts";
import { CHECK_CALIBRATION } from "../print/names.ts";
import {
  assign,
  BAD_ARRAY,
  BAD_AXIS,
  BAD_COUNT,
  BAD_ORDER,
  BAD_REAL,
  BAD_RISE,
  badArray,
  badAxis,
  badCount,
  badOrder,
  badReal,
  badRise,
  built,
  count,
  declare,
  local,
  real,
} from "./first-bad.ts";

const LARGEST = { float32: 2 ** 127 * (2 - 2 ** -23), float64: Number.MAX_VALUE } as const;
const LARGEST_COUNT = 2 ** 24;
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

const callOn = (name: string, value: Argument, bounds: readonly Expression[], index: number): Statement =>
  assign("bad", {
    kind: "call",
    function: name,
    arguments: [
      value,
      ...[...bounds, count(index), bad].map((each) => ({ kind: "value", value: each }) as const),
    ],
    type: COUNT,
    origin: built,
  });

const fieldValue = (place: Place, type: ValueType): Argument => ({
  kind: "value",
  value: { kind: "field", place, type, origin: built },
});

const checksOf = (
  leaf: Leaf,
  place: Place,
  info: CalibrationInfo | undefined,
  precision: Precision,
): readonly Statement[] => {
  const round = rounding(precision);
  const [low, high] = [round(info?.low ?? -LARGEST[precision]), round(info?.high ?? LARGEST[precision])];
  switch (leaf.type.kind) {
    case "array": {
      const array: Argument = { kind: "array", place, size: leaf.type.size };
      return [
        callOn(BAD_ARRAY, array, [real(low), real(high)], leaf.index),
        ...(info?.increasing ? [callOn(BAD_AXIS, array, [], leaf.index)] : []),
      ];
    }
    case "real":
      return [callOn(BAD_REAL, fieldValue(place, REAL), [real(low), real(high)], leaf.index)];
    case "count":
      return [
        callOn(
          BAD_COUNT,
          fieldValue(place, COUNT),
          [count(info?.low ?? 0), count(info?.high ?? LARGEST_COUNT)],
          leaf.index,
        ),
      ];
    default:
      return [];
  }
};

const numberAt = (calibration: Program["calibration"], path: string): number => {
  const value = path
    .split(".")
    .reduce<unknown>((at, field) => (at as Record<string, CalibrationValue>)[field], calibration);
  return Number(value);
};

/** Strict only where the spec's own values still differ once rounded: rounding must not refuse a valid spec. */
const isStrict = (program: Program, lower: string, upper: string): boolean => {
  const round = rounding(program.precision);
  return round(numberAt(program.calibration, lower)) < round(numberAt(program.calibration, upper));
};

const comparisonCheck = (
  program: Program,
  layout: Layout,
  leaves: readonly Leaf[],
  leaf: Leaf,
  { is, to }: Comparison,
): readonly Statement[] => {
  const other = leaves.find(({ runtime }) => runtime.join(".") === to);
  if (leaf.type.kind !== "real" || other?.type.kind !== "real") {
    return [];
  }
  const [lower, upper] = is === "above" || is === "notBelow" ? [other, leaf] : [leaf, other];
  const paths = [lower, upper].map(({ runtime }) => runtime.join("."));
  const strict = (is === "above" || is === "below") && isStrict(program, paths[0], paths[1]);
  const read = (each: Leaf): Expression => ({
    kind: "field",
    place: placeOf(layout, each),
    type: REAL,
    origin: built,
  });
  const value: Argument = { kind: "value", value: read(lower) };
  return [callOn(strict ? BAD_RISE : BAD_ORDER, value, [read(upper)], leaf.index)];
};

/**
 * Adds `checkCalibration`: the index of the first calibration value that is not finite, out of its declared range, out
 * of order on its axis or against another value; -1 when all are good. Indices count the values in the order of the struct. Counts without a
 * declared range must lie within 0 .. 2^24.
 */
export const addCalibrationCheck = (program: Program): Program => {
  const layout = layoutOf(program);
  if (program.calibrationStruct === undefined) {
    return program;
  }
  const leaves = leavesOf(layout, program.calibrationStruct);
  const checks = leaves.flatMap((leaf) => {
    const info = program.calibrationInfo[leaf.runtime.join(".")];
    const own = checksOf(leaf, placeOf(layout, leaf), info, program.precision);
    const compared = (info?.comparisons ?? []).flatMap((each) =>
      comparisonCheck(program, layout, leaves, leaf, each),
    );
    return [...own, ...compared];
  });
  const check: FunctionDefinition = {
    name: CHECK_CALIBRATION,
    parameters: [{ name: ROOT, type: { kind: "struct", name: program.calibrationStruct } }],
    returns: COUNT,
    doc: ["Looks at every calibration value: finite, within its range, axes and pairs in order."],
    at: built.runtime,
    body: [declare("bad", COUNT, count(-1)), ...checks],
    result: bad,
    resultComments: [],
  };
  const called = new Set<string>();
  eachCallOf(check, (call) => called.add(call.function));
  const helpers = [badReal, badCount, badOrder, badRise, badArray, badAxis].filter(({ name }) =>
    called.has(name),
  );
  return {
    ...program,
    functions: [...helpers, ...program.functions, check],
    entries: [
      ...program.entries,
      {
        function: CHECK_CALIBRATION,
        kind: "check",
        when: [
          "Call it once after the calibration was loaded or changed. Returns the index of the first bad value, or -1; run no step unless it is -1.",
          ...(program.whileRefused === undefined ? [] : [program.whileRefused]),
        ].join(" "),
      },
    ],
  };
};
