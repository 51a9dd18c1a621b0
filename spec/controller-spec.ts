import type { CurveSpec, Duration, Quantity, Range, TableSpec } from "./quantity.ts";
import type { Span } from "./span.ts";

export type SignalName =
  | "engine_speed"
  | "accelerator"
  | "boost_pressure"
  | "ambient_pressure"
  | "charge_temperature"
  | "inlet_temperature"
  | "manifold_pressure"
  | "turbo_speed"
  | "boost_ceiling_request";

/** Debounce and plausibility of one signal; every field has a value, from the file or from the reader's default. */
export interface SignalFault {
  readonly after: Duration;
  readonly healsAfter: Duration;
  /** Fastest believable change per second, in the signal's base unit; absent: not checked. */
  readonly rateAbove?: Quantity;
  readonly rateWindow?: Duration;
  readonly stuckFor?: Duration;
  /** How far another loop signal must have moved before standing still is suspect, in that signal's base unit. */
  readonly stuckMoved?: Quantity;
}

export interface SignalSpec {
  readonly name: SignalName;
  readonly range: Range;
  readonly otherwise?: Quantity;
  readonly filter?: Duration;
  readonly fault: SignalFault;
  readonly at: Span;
}

export type PressureReference = "absolute" | "gauge" | "pressure_ratio";

export interface AirCompensationSpec {
  readonly referenceTemperature: Quantity;
  readonly referencePressure: Quantity;
  readonly strength: Quantity;
  readonly atMost: Quantity;
  readonly at: Span;
}

export interface TargetSpec {
  /** Rows over accelerator (ratio), columns over engine speed (rpm); kPa, or bare for a pressure ratio. */
  readonly boost: TableSpec;
  readonly reference: PressureReference;
  readonly airCompensation?: AirCompensationSpec;
  readonly ceiling: Quantity;
  readonly pressureRatioCeiling?: Quantity;
  readonly leastBoost: Quantity;
  readonly slewRise: Quantity;
  readonly slewFall: Quantity;
  readonly at: Span;
}

export type Coordinate = "effective_area" | "opening";
export type Schedule = "per_gauge_pressure" | "over_engine_speed" | "over_target_pressure" | "constant";

/** A gain: one number, or a curve over the schedule's signal. */
export type Gain =
  | { readonly kind: "number"; readonly quantity: Quantity }
  | { readonly kind: "curve"; readonly curve: CurveSpec };

export type AntiWindupSpec =
  | {
      readonly method: "conditional";
      /** Ratio of the gauge target under `per_gauge_pressure`, else kPa. */
      readonly band: Quantity;
      /** 1/s of the gauge target under `per_gauge_pressure`, else kPa/s. */
      readonly stillBelow: Quantity;
      readonly at: Span;
    }
  | { readonly method: "back_calculation"; readonly trackingTime: Duration; readonly at: Span }
  | { readonly method: "none"; readonly at: Span };

/** Gains in the coordinate's base unit (mm2, or ratio of opening), times kPa and s as the schedule asks. */
export interface FeedbackSpec {
  readonly coordinate: Coordinate;
  readonly schedule: Schedule;
  readonly proportional: Gain;
  readonly integral?: Gain;
  readonly derivative?: Gain;
  readonly derivativeFilter?: Duration;
  readonly setpointWeight: Quantity;
  readonly trimLimits: Range;
  readonly antiWindup: AntiWindupSpec;
  readonly at: Span;
}

export interface ActuatorSpec {
  readonly opening: Range;
  readonly slewOpen: Quantity;
  readonly slewClose: Quantity;
  readonly safeOpening: Quantity;
  readonly restOpening: Quantity;
  readonly onPowerLoss: "open" | "closed" | "hold";
  readonly at: Span;
}

export interface TripSpec {
  readonly after: Duration;
  readonly torque: Quantity;
  readonly releaseBelow: Quantity;
  readonly releaseAfter: Duration;
  readonly acceleratorBelow: Quantity;
  readonly orAfter: Duration;
  readonly at: Span;
}

/** The floor that rises with turbo speed; absent: the guard only trips. */
export interface ProportionalGuardSpec {
  readonly lead: Duration;
  readonly accelerationWindow: Duration;
  readonly referenceSpeed: Quantity;
  /** Coordinate base unit per rpm. */
  readonly gain: Quantity;
  /** Integral of the floor: `gain * integralRate * (speed - reference)` per second; 1/s. */
  readonly integralRate: Quantity;
  readonly safePressureRatio: Quantity;
  /** kPa per rpm. */
  readonly targetReduction: Quantity;
  /** How fast the reduction is given back, kPa/s. */
  readonly targetRelease: Quantity;
}

export interface OverspeedGuardSpec {
  readonly limit: Quantity;
  readonly margin: Quantity;
  readonly proportional?: ProportionalGuardSpec;
  readonly trip?: TripSpec;
  readonly at: Span;
}

export interface FailSafeSpec {
  readonly torque: Quantity;
  readonly at: Span;
}

export interface ControllerSpec {
  readonly name: string;
  readonly description: string;
  readonly step: Duration;
  readonly guardStep: Duration;
  readonly precision: "float32" | "float64";
  readonly signals: Partial<Record<SignalName, SignalSpec>>;
  readonly target: TargetSpec;
  /** Effective area mm2 over opening ratio, strictly increasing; needed by coordinate `effective_area`. */
  readonly wastegateArea?: CurveSpec;
  /** Rows over target pressure ratio (or kPa abs: see `rowsOver`), columns over engine speed; in the feedback coordinate. */
  readonly feedforward?: TableSpec;
  readonly feedback: FeedbackSpec;
  readonly actuator: ActuatorSpec;
  readonly overspeedGuard?: OverspeedGuardSpec;
  readonly failSafe: FailSafeSpec;
  readonly at: Span;
}
