import type { RateCheckCalibration, SignalCalibration, StuckCheckCalibration } from "./plausibility.ts";
import type { Count, Curve, Real, Table2 } from "./types.ts";

/**
 * Every number that can change without generating code again. Pressures kPa, speeds rpm, temperatures K, openings and
 * fractions 0..1, areas mm2, times s; durations that are counted are whole steps of their task. "Coordinate" is mm2 of
 * effective wastegate area, or opening 0..1, as the spec chooses.
 */
export interface Calibration {
  readonly engineSpeed: SignalCalibration;
  readonly engineSpeedRate: RateCheckCalibration;
  readonly engineSpeedOtherwiseRpm: Real;
  readonly engineSpeedFilterS: Real;
  readonly accelerator: SignalCalibration;
  readonly acceleratorRate: RateCheckCalibration;
  readonly acceleratorOtherwiseRatio: Real;
  readonly acceleratorFilterS: Real;
  readonly boostPressure: SignalCalibration;
  readonly boostPressureRate: RateCheckCalibration;
  readonly boostPressureStuck: StuckCheckCalibration;
  readonly boostPressureFilterS: Real;
  readonly ambientPressure: SignalCalibration;
  readonly ambientPressureRate: RateCheckCalibration;
  readonly ambientPressureOtherwiseKpa: Real;
  readonly ambientPressureFilterS: Real;
  readonly chargeTemperature: SignalCalibration;
  readonly chargeTemperatureRate: RateCheckCalibration;
  readonly chargeTemperatureFilterS: Real;
  readonly boostCeilingRequest: SignalCalibration;
  readonly boostCeilingRequestRate: RateCheckCalibration;
  readonly boostCeilingRequestOtherwiseKpa: Real;
  readonly boostCeilingRequestFilterS: Real;
  readonly turboSpeed: SignalCalibration;
  readonly turboSpeedRate: RateCheckCalibration;
  readonly turboSpeedStuck: StuckCheckCalibration;
  readonly turboSpeedFilterS: Real;
  /** Fastest the turbo can plausibly gain speed while its sensor is doubted, rpm per fast step. */
  readonly turboSpeedGainPerStepRpm: Real;

  /** Rows over accelerator, columns over engine speed; kPa abs, kPa gauge or pressure ratio. */
  readonly targetBoost: Table2;
  readonly airReferenceTemperatureK: Real;
  readonly airReferencePressureKpa: Real;
  readonly airStrengthRatio: Real;
  readonly airAtMostRatio: Real;
  readonly boostCeilingKpa: Real;
  readonly pressureRatioCeiling: Real;
  readonly leastBoostKpa: Real;
  readonly targetRiseKpaPerS: Real;
  readonly targetFallKpaPerS: Real;

  /** Effective area mm2 over opening, strictly increasing. */
  readonly gateArea: Curve;
  /** Rows over target pressure ratio or target pressure, columns over engine speed; coordinate. */
  readonly feedforward: Table2;

  readonly proportionalGain: Real;
  readonly proportionalGainCurve: Curve;
  readonly integralGain: Real;
  readonly integralGainCurve: Curve;
  readonly derivativeGain: Real;
  readonly derivativeGainCurve: Curve;
  readonly derivativeFilterS: Real;
  readonly setpointWeightRatio: Real;
  readonly trimLow: Real;
  readonly trimHigh: Real;
  /** Fraction of the gauge target, or kPa. */
  readonly windupBand: Real;
  /** Fraction of the gauge target per second, or kPa/s. */
  readonly windupStillBelow: Real;
  readonly trackingTimeS: Real;

  readonly openingLowRatio: Real;
  readonly openingHighRatio: Real;
  readonly slewOpenRatioPerS: Real;
  readonly slewCloseRatioPerS: Real;
  readonly safeOpeningRatio: Real;
  readonly restOpeningRatio: Real;

  readonly speedLimitRpm: Real;
  /** limit * (1 - margin). */
  readonly speedCeilingRpm: Real;
  readonly guardLeadS: Real;
  readonly guardReferenceSpeedRpm: Real;
  /** Coordinate per rpm. */
  readonly guardGainPerRpm: Real;
  /** 1/s of the gain. */
  readonly guardIntegralRatePerS: Real;
  readonly guardSafePressureRatio: Real;
  readonly guardTargetReductionKpaPerRpm: Real;
  readonly guardTargetReleaseKpaPerS: Real;
  readonly tripAfterSteps: Count;
  readonly tripTorqueRatio: Real;
  readonly tripReleaseBelowRpm: Real;
  readonly tripReleaseAfterSteps: Count;
  readonly tripAcceleratorBelowRatio: Real;
  readonly tripOrAfterSteps: Count;

  readonly failSafeTorqueRatio: Real;
}
