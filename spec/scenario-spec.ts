import type { Span } from "./span.ts";

/** A value that is fixed (`low === high`) or drawn uniformly `between low and high`; base unit of its place. */
export interface Free {
  readonly low: number;
  readonly high: number;
  /** Unit as written (for counterexample files): `rpm`, `ms`. */
  readonly unit: string;
  readonly at: Span;
}

/** Piecewise course: at time `at` the value starts to move linearly to `value`, taking `over` (0: a step). */
export interface CoursePoint {
  readonly at: Free;
  readonly value: Free;
  readonly over: Free;
}
export type Course = readonly CoursePoint[];

export type EngineSpeedSpec =
  /** Imposed (dyno): a course in rpm; one point means held. */
  | { readonly kind: "imposed"; readonly course: Course }
  /** Free vehicle: the plant's inertia and load; starts at `from` rpm. */
  | { readonly kind: "vehicle"; readonly from: Free };

/** A fault with its start and length; `values` holds the kind's own fields in base units (SI or controller base, see FAULT_FIELDS). */
export interface FaultSpec {
  readonly kind: string;
  readonly from: Free;
  /** Absent: until the end. */
  readonly lasting?: Free;
  readonly values: Readonly<Record<string, Free>>;
  readonly at: Span;
}

export interface ScenarioSpec {
  readonly name: string;
  /** Seconds. */
  readonly duration: Free;
  readonly engineSpeed: EngineSpeedSpec;
  /** Ratio 0..1. */
  readonly accelerator: Course;
  /** Wanted boost, kPa abs, in place of the controller's table and compensation; absent: the table decides. */
  readonly target?: Course;
  /** False: the controller's ceilings are out of the way (only with `target`). */
  readonly ceilings: boolean;
  /** K and m (geopotential). */
  readonly ambient: { readonly temperature: Free; readonly altitude: Free };
  /** `none`, a named set, or a fraction for every scatterable parameter. */
  readonly plantScatter:
    | { readonly kind: "none" }
    | { readonly kind: "set"; readonly name: string }
    | { readonly kind: "uniform"; readonly ratio: number };
  /** Multiplies every sensor's noise: 1 nominal, 0 none. */
  readonly sensorNoise: number;
  readonly faults: readonly FaultSpec[];
  readonly at: Span;
}
