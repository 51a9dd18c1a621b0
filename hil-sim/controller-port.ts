/** What the loop feeds the controller: raw sensor values in the controller's base units, NaN allowed. */
export interface ControllerInput {
  engineSpeedRpm: number;
  acceleratorRatio: number;
  boostPressureKpa: number;
  ambientPressureKpa: number;
  chargeTemperatureK: number;
  inletTemperatureK: number;
  manifoldPressureKpa: number;
  boostCeilingRequestKpa: number;
  turboSpeedRpm: number;
}

/** What the loop takes from the controller after each step. */
export interface ControllerOutput {
  /** 0 closed .. 1 open. */
  wastegateCommandRatio: number;
  /** 0..1 of the request. */
  torqueLimitRatio: number;
  bypassCommandRatio: number;
  fuelCutPermitted: boolean;
  /** After ceilings, before guard and slew. */
  boostWantedKpa: number;
  /** Followed by the loop. */
  boostTargetKpa: number;
  /** Index into MODES. */
  mode: number;
  tripped: boolean;
  guardActive: boolean;
  failSafe: boolean;
  feedforwardTerm: number;
  proportionalTerm: number;
  integralTerm: number;
  derivativeTerm: number;
  guardFloor: number;
}

export const MODES = ["start", "no_boost", "closed_loop", "guard", "fail_safe"] as const;

/** A controller in any form (runtime, generated TypeScript, native C): the loop knows nothing else of it. */
export interface ControllerPort {
  readonly input: ControllerInput;
  readonly output: ControllerOutput;
  /** Seconds. */
  readonly step: number;
  /** Seconds; divides `step`. */
  readonly guardStep: number;
  /** Initial state, calibration as generated. */
  reset(): void;
  /** The fast step; runs first when both fall together. */
  stepGuard(): void;
  /** The slow step. */
  stepBoost(): void;
  /** Poses the wanted boost (kPa abs) in place of table and compensation, through the calibration. */
  poseTarget(kilopascalAbsolute: number): void;
  /** Puts the target ceilings out of the way, through the calibration. */
  liftCeilings(): void;
}
