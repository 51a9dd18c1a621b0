import type { Calibration } from "./calibration.ts";
import { interpolateCurve } from "./interpolate.ts";
import type { Structure } from "./structure.ts";
import type { Real } from "./types.ts";

/** Signal that gain curves run over: engine speed rpm, or target kPa abs. */
export function scheduleSignal(structure: Structure, engineSpeedRpm: Real, targetKpa: Real): Real {
  let signal: Real = engineSpeedRpm;
  if (structure.schedule === "over_target_pressure") {
    signal = targetKpa;
  }
  return signal;
}

export function proportionalGainAt(structure: Structure, calibration: Calibration, signal: Real): Real {
  let gain: Real = 0;
  if (structure.proportionalCurve) {
    gain = interpolateCurve(
      calibration.proportionalGainCurve.axis,
      calibration.proportionalGainCurve.values,
      signal,
    );
  } else {
    gain = calibration.proportionalGain;
  }
  return gain;
}

export function integralGainAt(structure: Structure, calibration: Calibration, signal: Real): Real {
  let gain: Real = 0;
  if (structure.integralCurve) {
    gain = interpolateCurve(calibration.integralGainCurve.axis, calibration.integralGainCurve.values, signal);
  } else {
    gain = calibration.integralGain;
  }
  return gain;
}

export function derivativeGainAt(structure: Structure, calibration: Calibration, signal: Real): Real {
  let gain: Real = 0;
  if (structure.derivativeCurve) {
    gain = interpolateCurve(
      calibration.derivativeGainCurve.axis,
      calibration.derivativeGainCurve.values,
      signal,
    );
  } else {
    gain = calibration.derivativeGain;
  }
  return gain;
}
