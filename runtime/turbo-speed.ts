import type { Calibration } from "./calibration.ts";
import { isFinite, max } from "./intrinsics.ts";
import { lowPass } from "./low-pass.ts";
import { debounce, movedTooFast, outsideRange, standsStill } from "./plausibility.ts";
import type { FastState } from "./state.ts";
import type { Structure } from "./structure.ts";
import type { Flag, Real } from "./types.ts";

/** Judges the raw turbo speed and keeps its debounce. A frozen sensor is recognised by the boost having moved. */
export function judgeTurboSpeed(
  structure: Structure,
  calibration: Calibration,
  state: FastState,
  raw: Real,
  boostPressureKpa: Real,
): void {
  let suspect: Flag = outsideRange(calibration.turboSpeed, raw);
  if (structure.turboSpeedRate) {
    if (!suspect) {
      suspect = movedTooFast(calibration.turboSpeedRate, state.turboSpeedRate, raw);
    }
  }
  if (structure.turboSpeedStuck) {
    if (!suspect) {
      suspect = standsStill(calibration.turboSpeedStuck, state.turboSpeedStuck, raw, boostPressureKpa);
    }
  }
  debounce(calibration.turboSpeed, state.turboSpeed, raw, suspect);
}

/**
 * Speed the guard acts on, rpm, never lower than any finite reading: while the sensor is doubted, the last good reading
 * plus the fastest plausible gain for as long as the doubt lasts, since a hidden overspeed kills.
 */
export function guardSpeed(calibration: Calibration, state: FastState, raw: Real): Real {
  let speed: Real = state.turboSpeed.lastGood;
  if (state.turboSpeed.suspect) {
    if (!state.turboSpeed.failed) {
      state.suspectGainRpm = state.suspectGainRpm + calibration.turboSpeedGainPerStepRpm;
    }
    speed = speed + state.suspectGainRpm;
  } else {
    state.suspectGainRpm = 0;
  }
  if (raw <= calibration.turboSpeed.high) {
    speed = max(raw, speed);
  }
  return speed;
}

/**
 * Over the mechanical limit now, whatever the other checks say: a finite reading at or above it, or a reading above
 * the believable range while the last good one was in the guard's band.
 */
export function overMechanicalLimit(calibration: Calibration, state: FastState, raw: Real): Flag {
  const finite = isFinite(raw);
  const runAway =
    raw > calibration.turboSpeed.high && state.turboSpeed.lastGood >= calibration.guardReferenceSpeedRpm;
  return finite && (raw >= calibration.speedLimitRpm || runAway);
}

/** Speed for the prediction, rpm: filtered if the spec asks for it. */
export function filteredTurboSpeed(
  structure: Structure,
  calibration: Calibration,
  state: FastState,
  speedRpm: Real,
): Real {
  let filtered: Real = speedRpm;
  if (structure.turboSpeedFilter) {
    filtered = lowPass(state.turboSpeedFilter, speedRpm, calibration.turboSpeedFilterS, structure.guardStepS);
  }
  return filtered;
}
