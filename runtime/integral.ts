import { coordinateOf } from "./arbitration.ts";
import type { Calibration } from "./calibration.ts";
import { normalise, scheduledGauge } from "./feedback.ts";
import { integralGainAt, scheduleSignal } from "./gains.ts";
import { abs, clamp, max } from "./intrinsics.ts";
import type { SlowState } from "./state.ts";
import type { Structure } from "./structure.ts";
import type { Flag, Real } from "./types.ts";

/** Time in which the integral term fades while the loop is not in charge, s. */
export const INTEGRAL_FADE_S: Real = 0.2;

/**
 * Conditional integration: integrate only while the output is not saturated in the error's direction, the guard does
 * not hold the gate, and the error is inside the band or the pressure nearly stands still.
 * source: Astrom & Hagglund, Advanced PID Control, 2006, conditional integration (from memory)
 */
export function mayIntegrate(
  calibration: Calibration,
  error: Real,
  rate: Real,
  saturatedClosed: Flag,
  saturatedOpen: Flag,
  guardActive: Flag,
): Flag {
  const drivesFurther = (saturatedOpen && error > 0) || (saturatedClosed && error < 0);
  const near = abs(error) < calibration.windupBand || abs(rate) < calibration.windupStillBelow;
  return !drivesFurther && !guardActive && near;
}

/**
 * Next integral term, kept within the trim limits.
 *   conditional        I += Ki e dt, when allowed
 *   back calculation   I += (Ki e + (applied - unlimited) / Tt) dt
 *   none               I += Ki e dt
 * source: Astrom & Hagglund, Advanced PID Control, 2006, back-calculation (from memory)
 */
export function nextIntegral(
  structure: Structure,
  calibration: Calibration,
  integral: Real,
  integralRate: Real,
  allowed: Flag,
  unlimited: Real,
  applied: Real,
): Real {
  let rate: Real = integralRate;
  if (structure.antiWindup === "conditional") {
    if (!allowed) {
      rate = 0;
    }
  }
  if (structure.antiWindup === "back_calculation") {
    rate = rate + (applied - unlimited) / calibration.trackingTimeS;
  }
  return clamp(integral + rate * structure.stepS, calibration.trimLow, calibration.trimHigh);
}

/** Whether conditional integration lets the integral move in this step. */
export function integrationAllowed(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  error: Real,
  gaugeKpa: Real,
  loopOpeningRatio: Real,
  guardActive: Flag,
): Flag {
  let allowed: Flag = true;
  if (structure.antiWindup === "conditional") {
    const closed = loopOpeningRatio <= calibration.openingLowRatio;
    const open = loopOpeningRatio >= calibration.openingHighRatio;
    const rate = normalise(structure, state.pressureRateKpaPerS, gaugeKpa);
    allowed = mayIntegrate(calibration, error, rate, closed, open, guardActive);
  }
  return allowed;
}

/**
 * Moves the integral term for the next step. `unlimited` is the sum of terms, `loopOpeningRatio` the opening for it,
 * `guardFloor` and `guardActive` as last read from the fast step.
 */
export function updateIntegral(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  unlimited: Real,
  loopOpeningRatio: Real,
  guardFloor: Real,
  guardActive: Flag,
): void {
  const gauge = scheduledGauge(state.targetKpa, state.measured.ambientPressureKpa);
  const error = normalise(structure, state.measured.boostPressureKpa - state.targetKpa, gauge);
  const schedule = scheduleSignal(structure, state.measured.engineSpeedRpm, state.targetKpa);
  const integralRate = integralGainAt(structure, calibration, schedule) * error;
  const allowed = integrationAllowed(
    structure,
    calibration,
    state,
    error,
    gauge,
    loopOpeningRatio,
    guardActive,
  );
  let applied: Real = unlimited;
  if (structure.antiWindup === "back_calculation") {
    applied = max(coordinateOf(structure, calibration, state.openingRatio), guardFloor);
  }
  state.integralTerm = nextIntegral(
    structure,
    calibration,
    state.integralTerm,
    integralRate,
    allowed,
    unlimited,
    applied,
  );
}

/** Lets the integral fade, so that the loop returns without a bump. */
export function fadeIntegral(structure: Structure, calibration: Calibration, state: SlowState): void {
  const kept =
    state.integralTerm - state.integralTerm * (structure.stepS / (INTEGRAL_FADE_S + structure.stepS));
  state.integralTerm = clamp(kept, calibration.trimLow, calibration.trimHigh);
}
