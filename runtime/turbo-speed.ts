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
    const tooFast = movedTooFast(
      calibration.turboSpeedRate,
      state.turboSpeedRate,
      raw,
      suspect,
      state.turboSpeed.failed,
    );
    suspect = suspect || tooFast;
  }
  if (structure.turboSpeedStuck) {
    if (!suspect) {
      suspect = standsStill(calibration.turboSpeedStuck, state.turboSpeedStuck, raw, boostPressureKpa);
    }
  }
  debounce(calibration.turboSpeed, state.turboSpeed, raw, suspect);
}

/**
 * Speed the guard acts on, rpm, never lower than a reading inside the believable range: while the sensor is doubted, the last good reading
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
 * Over the mechanical limit now, whatever the other checks say: a finite reading at or above it, or any reading above
 * the believable range, infinity included, while the last good one was in the guard's band.
 */
export function overMechanicalLimit(calibration: Calibration, state: FastState, raw: Real): Flag {
  const runAway =
    raw > calibration.turboSpeed.high && state.turboSpeed.lastGood >= calibration.guardReferenceSpeedRpm;
  return (isFinite(raw) && raw >= calibration.speedLimitRpm) || runAway;
}

/**
 * Last good speed for the prediction, rpm, filtered if the spec asks for it. While the sensor is doubted it stands
 * still: the assumed gain belongs to the speed now, and must not look like acceleration.
 */
export function filteredTurboSpeed(structure: Structure, calibration: Calibration, state: FastState): Real {
  let filtered: Real = state.turboSpeed.lastGood;
  if (structure.turboSpeedFilter) {
    filtered = lowPass(state.turboSpeedFilter, filtered, calibration.turboSpeedFilterS, structure.guardStepS);
  }
  return filtered;
}
