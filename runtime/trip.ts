import type { Calibration } from "./calibration.ts";
import type { FastState } from "./state.ts";
import type { Flag, Real } from "./types.ts";

/** Trips at once over the mechanical limit, or when the speed has been at the ceiling for `tripAfterSteps`. */
function updateTrip(
  calibration: Calibration,
  state: FastState,
  speedRpm: Real,
  overMechanicalLimit: Flag,
): void {
  let trips: Flag = overMechanicalLimit;
  if (speedRpm >= calibration.speedCeilingRpm) {
    if (state.aboveCeilingSteps >= calibration.tripAfterSteps) {
      trips = true;
    } else {
      state.aboveCeilingSteps = state.aboveCeilingSteps + 1;
    }
  } else {
    state.aboveCeilingSteps = 0;
  }
  if (trips) {
    state.tripped = true;
    state.belowReleaseSteps = 0;
    state.trippedSteps = 0;
  }
}

/** Releases after the speed has stayed low, once the driver has lifted or long enough has passed. */
function updateRelease(
  calibration: Calibration,
  state: FastState,
  speedRpm: Real,
  acceleratorRatio: Real,
): void {
  let low: Flag = false;
  if (speedRpm < calibration.tripReleaseBelowRpm) {
    if (state.belowReleaseSteps >= calibration.tripReleaseAfterSteps) {
      low = true;
    } else {
      state.belowReleaseSteps = state.belowReleaseSteps + 1;
    }
  } else {
    state.belowReleaseSteps = 0;
  }
  let waited: Flag = false;
  if (state.trippedSteps >= calibration.tripOrAfterSteps) {
    waited = true;
  } else {
    state.trippedSteps = state.trippedSteps + 1;
  }
  const lifted = acceleratorRatio < calibration.tripAcceleratorBelowRatio;
  if (low && (lifted || waited)) {
    state.tripped = false;
  }
}

/** Latched trip: true means the gate opens fully and torque is limited in this same fast step. */
export function latchTrip(
  calibration: Calibration,
  state: FastState,
  speedRpm: Real,
  overMechanicalLimit: Flag,
  acceleratorRatio: Real,
): Flag {
  if (state.tripped) {
    updateRelease(calibration, state, speedRpm, acceleratorRatio);
  }
  updateTrip(calibration, state, speedRpm, overMechanicalLimit);
  return state.tripped;
}
