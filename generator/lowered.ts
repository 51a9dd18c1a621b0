import type { Span } from "../spec/index.ts";

export type Precision = "float32" | "float64";

/**
 * What a struct of the runtime is for. `calibration` is constant, every `exchange` field is volatile, has one writer and
 * is read or written once per step. Structs nested in a struct share its role.
 */
export type StructRole = "calibration" | "state" | "exchange" | "input" | "output";

/** A runtime function that the caller's scheduler calls; printed as `<name>_<snake case of the function>`. */
export interface Entry {
  /** Name in the runtime: `initialise`, `stepBoost`, `stepGuard`. */
  readonly function: string;
  /** Printed name without the controller's prefix: `init`, `step_boost`; absent: snake case of the function. */
  readonly printed?: string;
  readonly kind: "init" | "step" | "check";
  /** One or two sentences for the header: when to call it. */
  readonly when: string;
  /** Time between two calls of a step, s; the header states it. */
  readonly periodS?: number;
}

/** A number, flag, enum member or list of numbers, or a struct of these: the shape of the runtime's `Calibration`. */
export type CalibrationValue =
  | number
  | boolean
  | string
  | readonly number[]
  | { readonly [field: string]: CalibrationValue };

/**
 * How a calibration number must stand to another one. State it at the later of the two, so that the other has been
 * checked by itself.
 */
export interface Comparison {
  /** `above` and `below` are strict, unless the spec's own two values are equal once rounded to the precision. */
  readonly is: "above" | "notBelow" | "notAbove" | "below";
  /** Path of the other number; a comparison with one that the structure never reads is left out. */
  readonly to: string;
}

/** What is known of one calibration value; the key is its path, `gateArea.axis` or `boostPressure.low`. */
export interface CalibrationInfo {
  readonly unit: string;
  /** As the engineer wrote it, for a comment: `245 kPa abs`. Not for arrays: their elements print as numbers. */
  readonly written?: string;
  /** Where the spec says it; absent for a value that the lowering made. */
  readonly at?: Span;
  /** Allowed range, both ends included; absent: any finite number. */
  readonly low?: number;
  readonly high?: number;
  /** An axis: each element greater than the one before. */
  readonly increasing?: boolean;
  /** Not for arrays. */
  readonly comparisons?: readonly Comparison[];
}

/** A spec made ready for code: everything the passes need beside the text of the runtime. */
export interface Lowered {
  /** Stem of file and function names: letters, digits and underscores. */
  readonly name: string;
  readonly description: string;
  /** Spec file as the user named it, without folders. */
  readonly source: string;
  readonly precision: Precision;
  /** Value of every field of the runtime's `Structure`. */
  readonly structure: Readonly<Record<string, number | boolean | string>>;
  /** Unit of a structure number, for its comment: `{ stepS: "s" }`. */
  readonly structureUnits?: Readonly<Record<string, string>>;
  readonly entries: readonly Entry[];
  /** By name of the runtime's interface. */
  readonly roles: Readonly<Record<string, StructRole>>;
  /**
   * Length of every array field, by interface and field: `GuardState.history`; of a curve or table by its part too:
   * `Calibration.gateArea.axis`, `Calibration.gateArea.values`, `Calibration.boost.rows`, `.columns`, `.values`.
   */
  readonly arraySizes: Readonly<Record<string, number>>;
  readonly calibration: { readonly [field: string]: CalibrationValue };
  readonly calibrationInfo: Readonly<Record<string, CalibrationInfo>>;
  /** The spec's meaning as text, hashed for the banner: equal for two specs that differ in comments only. */
  readonly meaning: string;
  /** Sentences for the header: what the caller does while the calibration check returns an index. */
  readonly whileRefused?: string;
  /** Lines of the header's caution block. */
  readonly cautions: readonly string[];
}
