import type { LowPassState } from "./low-pass.ts";
import type { Mode } from "./modes.ts";
import type { RateCheckState, SignalState, StuckCheckState } from "./plausibility.ts";
import type { Count, Flag, Real } from "./types.ts";

/** This step's conditioned signals. */
export interface Measured {
  engineSpeedRpm: Real;
  acceleratorRatio: Real;
  boostPressureKpa: Real;
  ambientPressureKpa: Real;
  /** The safe side for ceilings: the lowest believable pressure while the sensor has failed. */
  lowestAmbientKpa: Real;
  chargeTemperatureK: Real;
  boostCeilingRequestKpa: Real;
}

/** What the slow step remembers. */
export interface SlowState {
  measured: Measured;
  engineSpeed: SignalState;
  engineSpeedRate: RateCheckState;
  engineSpeedFilter: LowPassState;
  accelerator: SignalState;
  acceleratorRate: RateCheckState;
  acceleratorFilter: LowPassState;
  boostPressure: SignalState;
  boostPressureRate: RateCheckState;
  boostPressureStuck: StuckCheckState;
  boostPressureFilter: LowPassState;
  ambientPressure: SignalState;
  ambientPressureRate: RateCheckState;
  ambientPressureFilter: LowPassState;
  chargeTemperature: SignalState;
  chargeTemperatureRate: RateCheckState;
  chargeTemperatureFilter: LowPassState;
  boostCeilingRequest: SignalState;
  boostCeilingRequestRate: RateCheckState;
  boostCeilingRequestFilter: LowPassState;

  mode: Mode;
  targetKpa: Real;
  boostWanted: Flag;
  /** Integral term in the feedback coordinate, so that a changed gain causes no jump. */
  integralTerm: Real;
  previousPressureKpa: Real;
  pressureRateKpaPerS: Real;
  openingRatio: Real;
}

/** What the fast step remembers. */
export interface FastState {
  turboSpeed: SignalState;
  turboSpeedRate: RateCheckState;
  turboSpeedStuck: StuckCheckState;
  turboSpeedFilter: LowPassState;
  suspectGainRpm: Real;

  /** Ring of the last filtered speeds, one per fast step of the acceleration window. */
  speedHistoryRpm: Real[];
  speedHistoryNext: Count;
  speedHistoryFilled: Flag;

  guardIntegralTerm: Real;
  targetReductionKpa: Real;

  tripped: Flag;
  aboveCeilingSteps: Count;
  belowReleaseSteps: Count;
  trippedSteps: Count;
}
