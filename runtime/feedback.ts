import type { Calibration } from "./calibration.ts";
import { abs, clamp, max } from "./intrinsics.ts";
import type { Structure } from "./structure.ts";
import type { Flag, Real } from "./types.ts";

/** Smallest gauge target that the gain schedule divides by, kPa. */
export const LEAST_GAUGE_KPA: Real = 25;

/**
 * Gauge target for the gain schedule, kPa, never below 25: the plant's slope is proportional to gauge pressure, so
 * dividing by it makes the loop gain nearly constant.
 */
export function scheduledGauge(targetKpa: Real, ambientKpa: Real): Real {
  return max(targetKpa - ambientKpa, LEAST_GAUGE_KPA);
}

/** A pressure or its rate as the gains see it: over the gauge target, or as it is. */
export function normalise(structure: Structure, value: Real, gaugeKpa: Real): Real {
  let normalised: Real = value;
  if (structure.schedule === "per_gauge_pressure") {
    normalised = value / gaugeKpa;
  }
  return normalised;
}

/**
 * Proportional term with set-point weight b, on gauge pressures.
 *   P = K ((p - pamb) - b (r - pamb)); more opening lowers the boost, so the error is measured minus target.
 * source: Astrom & Hagglund, Advanced PID Control, 2006, two-degree-of-freedom PID (from memory)
 */
export function proportionalTerm(
  structure: Structure,
  gain: Real,
  setpointWeight: Real,
  pressureKpa: Real,
  targetKpa: Real,
  ambientKpa: Real,
  gaugeKpa: Real,
): Real {
  const weighted = pressureKpa - ambientKpa - setpointWeight * (targetKpa - ambientKpa);
  return gain * normalise(structure, weighted, gaugeKpa);
}

/**
 * Filtered rate of the measured pressure, kPa/s, by the backward Euler rule.
 *   d[k] = (tau d[k-1] + p[k] - p[k-1]) / (tau + dt)
 * source: Astrom & Hagglund, Advanced PID Control, 2006, discretised derivative with filter (from memory)
 */
export function filteredRate(
  previousRate: Real,
  previousKpa: Real,
  pressureKpa: Real,
  filterS: Real,
  stepS: Real,
): Real {
  return (filterS * previousRate + (pressureKpa - previousKpa)) / (filterS + stepS);
}

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
