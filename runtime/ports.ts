import type { Mode } from "./modes.ts";
import type { Flag, Real } from "./types.ts";

/** Sampled once per slow step; any bit pattern is allowed. */
export interface SlowInput {
  readonly engineSpeedRpm: Real;
  readonly acceleratorRatio: Real;
  readonly boostPressureKpa: Real;
  readonly ambientPressureKpa: Real;
  readonly chargeTemperatureK: Real;
  readonly boostCeilingRequestKpa: Real;
}

/** Sampled once per fast step; any bit pattern is allowed. */
export interface FastInput {
  readonly turboSpeedRpm: Real;
}

/** Set by every slow step: what a calibration engineer plots. */
export interface SlowOutput {
  /** After ceilings, before the guard's reduction and the slew. */
  boostWantedKpa: Real;
  /** What the loop follows. */
  boostTargetKpa: Real;
  mode: Mode;
  feedforwardTerm: Real;
  proportionalTerm: Real;
  integralTerm: Real;
  derivativeTerm: Real;
  wantedOpeningRatio: Real;
  engineSpeedFailed: Flag;
  acceleratorFailed: Flag;
  boostPressureFailed: Flag;
  ambientPressureFailed: Flag;
}

/** Set by every fast step: what the actuator and the torque path use. */
export interface FastOutput {
  /** 0 closed .. 1 open. */
  wastegateCommandRatio: Real;
  /** 0..1 of the driver's request. */
  torqueLimitRatio: Real;
  overLimit: Flag;
  guardActive: Flag;
  failSafe: Flag;
  /** Coordinate. */
  guardFloor: Real;
  turboSpeedSuspect: Flag;
  turboSpeedFailed: Flag;
}
