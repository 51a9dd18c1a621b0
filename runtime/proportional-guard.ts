import { highestCoordinate } from "./arbitration.ts";
import type { Calibration } from "./calibration.ts";
import { clamp, max, min, toReal } from "./intrinsics.ts";
import type { FastState } from "./state.ts";
import type { Structure } from "./structure.ts";
import { filteredTurboSpeed } from "./turbo-speed.ts";
import type { Real } from "./types.ts";

/**
 * Turbo acceleration, rpm/s, over the whole window: one quantum of a counting sensor then moves it little. Zero until
 * the window is filled.
 *   a = (N[k] - N[k-n]) / (n dt)
 */
export function turboAcceleration(structure: Structure, state: FastState, speedRpm: Real): Real {
  const oldest: Real = state.speedHistoryRpm[state.speedHistoryNext];
  let acceleration: Real = 0;
  if (state.speedHistoryFilled) {
    acceleration = (speedRpm - oldest) / (toReal(structure.accelerationSteps) * structure.guardStepS);
  }
  state.speedHistoryRpm[state.speedHistoryNext] = speedRpm;
  if (state.speedHistoryNext + 1 >= structure.accelerationSteps) {
    state.speedHistoryNext = 0;
    state.speedHistoryFilled = true;
  } else {
    state.speedHistoryNext = state.speedHistoryNext + 1;
  }
  return acceleration;
}

/**
 * Speed one lead time ahead, rpm, never below the speed now; the speed now until there has been a good reading, so that
 * neither filter nor history starts from a bad one.
 */
export function predictedSpeed(
  structure: Structure,
  calibration: Calibration,
  state: FastState,
  speedRpm: Real,
): Real {
  let predicted: Real = speedRpm;
  if (state.turboSpeed.hasGood) {
    const filtered = filteredTurboSpeed(structure, calibration, state);
    const acceleration = turboAcceleration(structure, state, filtered);
    predicted = max(filtered + calibration.guardLeadS * acceleration, speedRpm);
  }
  return predicted;
}

/**
 * Floor under the gate, in the feedback coordinate, within closed .. fully open.
 *   floor = base(engine speed) + g (predicted - reference) + integral;  integral += g w (speed - reference) dt
 * The base is the feedforward at a safe pressure ratio: a floor that starts from closed comes too late.
 * Own design.
 */
export function guardFloor(
  structure: Structure,
  calibration: Calibration,
  state: FastState,
  base: Real,
  predictedRpm: Real,
  speedRpm: Real,
): Real {
  const open = highestCoordinate(structure, calibration);
  const over = speedRpm - calibration.guardReferenceSpeedRpm;
  const integralRate = calibration.guardGainPerRpm * calibration.guardIntegralRatePerS * over;
  state.guardIntegralTerm = clamp(state.guardIntegralTerm + integralRate * structure.guardStepS, 0, open);
  const proportional = calibration.guardGainPerRpm * (predictedRpm - calibration.guardReferenceSpeedRpm);
  return clamp(base + proportional + state.guardIntegralTerm, 0, open);
}

/**
 * Reduction of the boost target, kPa: taken at once in proportion to the predicted excess, given back slowly; at most
 * what leads from the ceiling down to no boost.
 */
export function targetReduction(
  structure: Structure,
  calibration: Calibration,
  state: FastState,
  predictedRpm: Real,
): Real {
  const excess = max(predictedRpm - calibration.guardReferenceSpeedRpm, 0);
  const wanted = calibration.guardTargetReductionKpaPerRpm * excess;
  const released = max(
    state.targetReductionKpa - calibration.guardTargetReleaseKpaPerS * structure.guardStepS,
    0,
  );
  const most = max(calibration.boostCeilingKpa - calibration.ambientPressureOtherwiseKpa, 0);
  state.targetReductionKpa = min(max(wanted, released), most);
  return state.targetReductionKpa;
}
