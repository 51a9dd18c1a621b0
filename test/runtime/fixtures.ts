import { type Calibration, initialise, type Structure } from "../../runtime/index.ts";
import {
  newExchange,
  newFastOutput,
  newFastState,
  newSlowOutput,
  newSlowState,
} from "../../verification/controllers/runtime-memory.ts";

/** A complete structure: constant gains on the opening, every guard on; tests replace what they look at. */
export const STRUCTURE: Structure = {
  stepS: 0.005,
  guardStepS: 0.001,
  engineSpeedRate: false,
  engineSpeedFilter: false,
  acceleratorRate: false,
  acceleratorFilter: false,
  boostPressureRate: true,
  boostPressureStuck: false,
  boostPressureFilter: false,
  ambientPressureRate: false,
  ambientPressureFilter: false,
  chargeTemperatureRate: false,
  chargeTemperatureFilter: false,
  boostCeilingRequestRate: false,
  boostCeilingRequestFilter: false,
  turboSpeedRate: true,
  turboSpeedStuck: true,
  turboSpeedFilter: false,
  targetReference: "absolute",
  airCompensation: false,
  pressureRatioCeiling: true,
  boostCeilingRequest: false,
  feedforward: "over_pressure_ratio",
  coordinate: "effective_area",
  schedule: "per_gauge_pressure",
  proportionalCurve: false,
  integral: true,
  integralCurve: false,
  derivative: true,
  derivativeCurve: false,
  antiWindup: "conditional",
  overspeedGuard: true,
  proportionalGuard: true,
  trip: true,
  accelerationSteps: 50,
};

const signal = (low: number, high: number, afterSteps: number, healsAfterSteps: number) => ({
  low,
  high,
  afterSteps,
  healsAfterSteps,
});
const curve = { axis: [0, 1], values: [0, 1] };

export const CALIBRATION: Calibration = {
  engineSpeed: signal(0, 9000, 10, 100),
  engineSpeedRate: { mostChange: 1000, windowSteps: 4 },
  engineSpeedOtherwiseRpm: 3000,
  engineSpeedFilterS: 0.02,
  accelerator: signal(0, 1, 10, 100),
  acceleratorRate: { mostChange: 1, windowSteps: 4 },
  acceleratorOtherwiseRatio: 0,
  acceleratorFilterS: 0.02,
  boostPressure: signal(20, 350, 10, 100),
  boostPressureRate: { mostChange: 80, windowSteps: 4 },
  boostPressureStuck: { steps: 80, moved: 5 },
  boostPressureFilterS: 0.008,
  ambientPressure: signal(50, 110, 10, 100),
  ambientPressureRate: { mostChange: 10, windowSteps: 4 },
  ambientPressureOtherwiseKpa: 100,
  ambientPressureFilterS: 0.1,
  chargeTemperature: signal(233.15, 423.15, 10, 100),
  chargeTemperatureRate: { mostChange: 10, windowSteps: 4 },
  chargeTemperatureFilterS: 0.1,
  boostCeilingRequest: signal(0, 400, 10, 100),
  boostCeilingRequestRate: { mostChange: 400, windowSteps: 4 },
  boostCeilingRequestOtherwiseKpa: 150,
  boostCeilingRequestFilterS: 0.1,
  turboSpeed: signal(0, 230000, 30, 1000),
  turboSpeedRate: { mostChange: 6000, windowSteps: 10 },
  turboSpeedStuck: { steps: 400, moved: 5 },
  turboSpeedFilterS: 0.01,
  turboSpeedGainPerStepRpm: 600,
  targetBoost: { rows: [0, 1], columns: [1000, 7000], values: [100, 100, 240, 240] },
  airReferenceTemperatureK: 298.15,
  airReferencePressureKpa: 101.325,
  airStrengthRatio: 0.8,
  airAtMostRatio: 0.2,
  boostCeilingKpa: 245,
  pressureRatioCeiling: 2.7,
  leastBoostKpa: 5,
  targetRiseKpaPerS: 900,
  targetFallKpaPerS: 1500,
  gateArea: { axis: [0, 0.5, 1], values: [4, 500, 630] },
  feedforward: { rows: [1, 2.4], columns: [2000, 7000], values: [630, 630, 100, 450] },
  proportionalGain: 1481,
  proportionalGainCurve: curve,
  integralGain: 3951,
  integralGainCurve: curve,
  derivativeGain: 163,
  derivativeGainCurve: curve,
  derivativeFilterS: 0.02,
  setpointWeightRatio: 1,
  trimLow: -220,
  trimHigh: 220,
  windupBand: 0.1,
  windupStillBelow: 0.15,
  trackingTimeS: 0.2,
  openingLowRatio: 0,
  openingHighRatio: 1,
  slewOpenRatioPerS: 9,
  slewCloseRatioPerS: 5,
  safeOpeningRatio: 1,
  restOpeningRatio: 0.3,
  speedLimitRpm: 165000,
  speedCeilingRpm: 160050,
  guardLeadS: 0.12,
  guardReferenceSpeedRpm: 158000,
  guardGainPerRpm: 0.0209,
  guardIntegralRatePerS: 1,
  guardSafePressureRatio: 2.4,
  guardTargetReductionKpaPerRpm: 0.004,
  guardTargetReleaseKpaPerS: 40,
  tripAfterSteps: 2,
  tripTorqueRatio: 0.4,
  tripReleaseBelowRpm: 145000,
  tripReleaseAfterSteps: 300,
  tripAcceleratorBelowRatio: 0.1,
  tripOrAfterSteps: 3000,
  failSafeTorqueRatio: 0.4,
};

/** Memory as after power-on. */
function memory() {
  const slow = newSlowState();
  const fast = newFastState(STRUCTURE.accelerationSteps);
  const shared = newExchange();
  initialise(STRUCTURE, CALIBRATION, slow, fast, shared);
  return { slow, fast, shared };
}

export const slowState = () => memory().slow;
export const fastState = () => memory().fast;
export const exchange = () => memory().shared;
export const slowOutput = newSlowOutput;
export const fastOutput = newFastOutput;
