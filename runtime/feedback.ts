import type { Calibration } from "./calibration.ts";
import { feedforwardFor } from "./feedforward.ts";
import { derivativeGainAt, proportionalGainAt, scheduleSignal } from "./gains.ts";
import { max } from "./intrinsics.ts";
import type { SlowOutput } from "./ports.ts";
import type { Measured, SlowState } from "./state.ts";
import type { Structure } from "./structure.ts";
import type { Real } from "./types.ts";

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
 * Error with set-point weight b on gauge pressures, kPa; the proportional term is the gain times it.
 *   P = K ((p - pamb) - b (r - pamb)); more opening lowers the boost, so the error is measured minus target.
 * source: Astrom & Hagglund, Advanced PID Control, 2006, two-degree-of-freedom PID (from memory)
 */
export function weightedError(calibration: Calibration, measured: Measured, targetKpa: Real): Real {
  const gauge = measured.boostPressureKpa - measured.ambientPressureKpa;
  return gauge - calibration.setpointWeightRatio * (targetKpa - measured.ambientPressureKpa);
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

/** Rate of the measured pressure, kPa/s; zero in the first step. */
export function pressureRate(structure: Structure, calibration: Calibration, state: SlowState): Real {
  const pressure = state.measured.boostPressureKpa;
  let previous: Real = state.previousPressureKpa;
  if (state.mode === "start") {
    previous = pressure;
  }
  state.pressureRateKpaPerS = filteredRate(
    state.pressureRateKpaPerS,
    previous,
    pressure,
    calibration.derivativeFilterS,
    structure.stepS,
  );
  state.previousPressureKpa = pressure;
  return state.pressureRateKpaPerS;
}

/** Feedforward, P, I and D for a target, each written to the output; returns their sum in the feedback coordinate. */
export function sumOfTerms(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  targetKpa: Real,
  output: SlowOutput,
): Real {
  const ambient = state.measured.ambientPressureKpa;
  const engineSpeed = state.measured.engineSpeedRpm;
  const schedule = scheduleSignal(structure, engineSpeed, targetKpa);
  const gauge = scheduledGauge(targetKpa, ambient);
  const gain = proportionalGainAt(structure, calibration, schedule);
  const weighted = weightedError(calibration, state.measured, targetKpa);
  const feedforward = feedforwardFor(structure, calibration, targetKpa, ambient, engineSpeed);
  const proportional = gain * normalise(structure, weighted, gauge);
  output.feedforwardTerm = feedforward;
  output.proportionalTerm = proportional;
  let sum: Real = feedforward + proportional;
  if (structure.integral) {
    output.integralTerm = state.integralTerm;
    sum = sum + state.integralTerm;
  }
  if (structure.derivative || structure.antiWindup === "conditional") {
    const rate = pressureRate(structure, calibration, state);
    if (structure.derivative) {
      const derivative =
        derivativeGainAt(structure, calibration, schedule) * normalise(structure, rate, gauge);
      output.derivativeTerm = derivative;
      sum = sum + derivative;
    }
  }
  return sum;
}
