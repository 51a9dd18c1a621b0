import type { Span } from "../../spec/index.ts";
import type { CalibrationInfo, CalibrationValue, Entry, StructRole } from "../lowered.ts";
import type { Expression, ValueType } from "./expression.ts";
import type { Statement } from "./statement.ts";

/** A field of a struct. A table's parts are fields of their own, named with a dot: `gateArea.axis`. */
export interface Field {
  readonly name: string;
  readonly type: FieldType;
  readonly doc: readonly string[];
  readonly at: Span;
}

export type FieldType =
  | ValueType
  | { readonly kind: "struct"; readonly name: string }
  | { readonly kind: "array"; readonly size: number };

export interface Struct {
  readonly name: string;
  readonly role: StructRole;
  readonly fields: readonly Field[];
  readonly doc: readonly string[];
  readonly at: Span;
}

export interface Enumeration {
  readonly name: string;
  readonly members: readonly string[];
  readonly doc: readonly string[];
}

/** A number with a name: of a runtime module, or of the structure (`stepS`), rounded once to the precision. */
export interface Constant {
  readonly name: string;
  readonly value: number;
  readonly type: ValueType;
  readonly doc: readonly string[];
  readonly unit?: string;
}

export type ParameterType =
  | ValueType
  | { readonly kind: "struct"; readonly name: string }
  /** `counted`: the length is needed inside, so C passes it along. */
  | { readonly kind: "array"; readonly counted: boolean };

export interface Parameter {
  readonly name: string;
  readonly type: ParameterType;
}

export interface FunctionDefinition {
  readonly name: string;
  readonly parameters: readonly Parameter[];
  /** Absent: returns nothing. */
  readonly returns?: ValueType;
  readonly body: readonly Statement[];
  /** The value of the one return at the end. */
  readonly result?: Expression;
  /** Sentences above the return. */
  readonly resultComments: readonly string[];
  readonly doc: readonly string[];
  readonly at: Span;
}

/** A controller for one spec: what every target prints or runs. Plain data; functions stand after those they call. */
export interface Program {
  readonly name: string;
  readonly description: string;
  readonly source: string;
  readonly meaning: string;
  readonly precision: "float32" | "float64";
  readonly cautions: readonly string[];
  readonly whileRefused?: string;
  readonly enumerations: readonly Enumeration[];
  /** Inner structs stand before those that hold them. */
  readonly structs: readonly Struct[];
  readonly constants: readonly Constant[];
  readonly functions: readonly FunctionDefinition[];
  /** What the caller calls, in the order of the header. Includes the calibration check. */
  readonly entries: readonly Entry[];
  /** Name of the struct that holds the calibration; absent when none is left. */
  readonly calibrationStruct?: string;
  readonly calibration: { readonly [field: string]: CalibrationValue };
  readonly calibrationInfo: Readonly<Record<string, CalibrationInfo>>;
}

export const findStruct = (program: Pick<Program, "structs">, name: string): Struct => {
  const found = program.structs.find((struct) => struct.name === name);
  if (found === undefined) {
    throw new Error(`internal: no struct ${name}`);
  }
  return found;
};

export const findFunction = (program: Pick<Program, "functions">, name: string): FunctionDefinition => {
  const found = program.functions.find((each) => each.name === name);
  if (found === undefined) {
    throw new Error(`internal: no function ${name}`);
  }
  return found;
};
