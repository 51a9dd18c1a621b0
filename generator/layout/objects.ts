import type { Value } from "../interpret/operations.ts";
import { rounding } from "../interpret/operations.ts";
import type { CalibrationValue, Precision } from "../lowered.ts";
import type { Layout } from "./layout.ts";
import { type Leaf, leavesOf } from "./leaves.ts";

/** A struct as a plain object: values, arrays of reals, and inner structs. */
export interface StructObject {
  [field: string]: Value | number[] | StructObject;
}

/** Which names an object's fields carry: the runtime's, or those of the generated code. */
export type Naming = "runtime" | "printed";

const holderOf = (object: StructObject, path: readonly string[]): StructObject =>
  path.slice(0, -1).reduce((holder, name) => {
    holder[name] ??= {};
    return holder[name] as StructObject;
  }, object);

export const getAt = (object: StructObject, path: readonly string[]): Value | number[] =>
  holderOf(object, path)[path[path.length - 1]] as Value | number[];

export const setAt = (object: StructObject, path: readonly string[], value: Value | number[]): void => {
  holderOf(object, path)[path[path.length - 1]] = value;
};

const zeroOf = (layout: Layout, { type }: Leaf): Value | number[] => {
  switch (type.kind) {
    case "array":
      return new Array<number>(type.size).fill(0);
    case "flag":
      return false;
    case "enum":
      return layout.enumerations.find(({ name }) => name === type.name)?.members[0] ?? "";
    default:
      return 0;
  }
};

/** A struct with every value zero, false or the first member. */
export const createStruct = (layout: Layout, struct: string, naming: Naming): StructObject => {
  const object: StructObject = {};
  for (const leaf of leavesOf(layout, struct)) {
    setAt(object, leaf[naming], zeroOf(layout, leaf));
  }
  return object;
};

const roundedValue = (
  value: CalibrationValue | undefined,
  leaf: Leaf,
  precision: Precision,
): Value | number[] => {
  const round = rounding(precision);
  if (leaf.type.kind === "array" && Array.isArray(value) && value.length === leaf.type.size) {
    return value.map((each) => round(Number(each)));
  }
  if (leaf.type.kind === "real" && typeof value === "number") {
    return round(value);
  }
  if (leaf.type.kind === "count" && typeof value === "number" && Number.isInteger(value)) {
    return value;
  }
  const fits =
    (leaf.type.kind === "flag" && typeof value === "boolean") ||
    (leaf.type.kind === "enum" && typeof value === "string");
  if (fits) {
    return value;
  }
  throw new Error(`internal: the calibration lacks a ${leaf.type.kind} at ${leaf.runtime.join(".")}`);
};

/** The spec's calibration, rounded once to the precision; values that the code has no use for are left out. */
export const createCalibration = (
  layout: Layout,
  values: { readonly [field: string]: CalibrationValue },
  naming: Naming,
): StructObject => {
  const object: StructObject = {};
  const { calibrationStruct, precision } = layout;
  for (const leaf of calibrationStruct === undefined ? [] : leavesOf(layout, calibrationStruct)) {
    const value = leaf.runtime.reduce<CalibrationValue | undefined>(
      (holder, name) =>
        typeof holder === "object" && !Array.isArray(holder) ? (holder as typeof values)[name] : undefined,
      values,
    );
    setAt(object, leaf[naming], roundedValue(value, leaf, precision));
  }
  return object;
};
