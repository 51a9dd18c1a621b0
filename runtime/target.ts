import type { Calibration } from "./calibration.ts";
import { interpolateTable } from "./interpolate.ts";
import { clamp, max, min } from "./intrinsics.ts";
import { rateLimit } from "./rate-limit.ts";
import type { Measured, SlowState } from "./state.ts";
import type { Structure } from "./structure.ts";
import type { Flag, Real } from "./types.ts";

/**
 * Factor on the wanted pressure that holds the air mass when the charge is hot, within 1 .. 1 + at most.
 *   factor = 1 + strength (Tcharge / Tref - 1), times pref / pamb for gauge and ratio targets only, since the air mass
 *   at a fixed absolute pressure does not depend on the weather's pressure. Ideal gas law.
 */
export function airFactor(
  structure: Structure,
  calibration: Calibration,
  chargeTemperatureK: Real,
  ambientKpa: Real,
): Real {
  let factor: Real =
    1 + calibration.airStrengthRatio * (chargeTemperatureK / calibration.airReferenceTemperatureK - 1);
  if (structure.targetReference !== "absolute") {
    factor = factor * (calibration.airReferencePressureKpa / ambientKpa);
  }
  return clamp(factor, 1, 1 + calibration.airAtMostRatio);
}

/** Pressure the driver asks for, kPa abs: table over accelerator and engine speed, in the table's own reference. */
export function requestedBoost(structure: Structure, calibration: Calibration, measured: Measured): Real {
  const fromTable = interpolateTable(
    calibration.targetBoost.rows,
    calibration.targetBoost.columns,
    calibration.targetBoost.values,
    measured.acceleratorRatio,
    measured.engineSpeedRpm,
  );
  let absolute: Real = fromTable;
  if (structure.targetReference === "gauge") {
    absolute = measured.ambientPressureKpa + fromTable;
  }
  if (structure.targetReference === "pressure_ratio") {
    absolute = measured.ambientPressureKpa * fromTable;
  }
  if (structure.airCompensation) {
    absolute =
      absolute * airFactor(structure, calibration, measured.chargeTemperatureK, measured.ambientPressureKpa);
  }
  return absolute;
}

/** The lowest of the ceilings, kPa abs. */
export function boostCeiling(structure: Structure, calibration: Calibration, measured: Measured): Real {
  let ceiling: Real = calibration.boostCeilingKpa;
  if (structure.pressureRatioCeiling) {
    ceiling = min(ceiling, calibration.pressureRatioCeiling * measured.lowestAmbientKpa);
  }
  if (structure.boostCeilingRequest) {
    ceiling = min(ceiling, measured.boostCeilingRequestKpa);
  }
  return ceiling;
}

/**
 * The target that the loop follows, kPa abs: wanted less the guard's reduction, but no lower than ambient by it, slewed.
 * `restart`: begin at the boost there is, after power-on, after fail-safe and while a trip holds the gate open.
 */
export function followTarget(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  wantedKpa: Real,
  reductionKpa: Real,
  restart: Flag,
): Real {
  let previous: Real = state.targetKpa;
  if (restart) {
    previous = state.measured.boostPressureKpa;
  }
  const reduced = max(wantedKpa - reductionKpa, min(wantedKpa, state.measured.ambientPressureKpa));
  state.targetKpa = rateLimit(
    previous,
    reduced,
    calibration.targetRiseKpaPerS,
    calibration.targetFallKpaPerS,
    structure.stepS,
  );
  return state.targetKpa;
}

/** Fall below the least boost that ends it, kPa. */
export const LEAST_BOOST_HYSTERESIS_KPA: Real = 2;

/** Whether the target asks for boost: ambient plus the least boost to begin, a little lower to end. */
export function wantsBoost(calibration: Calibration, state: SlowState): Flag {
  let threshold: Real = state.measured.ambientPressureKpa + calibration.leastBoostKpa;
  if (state.boostWanted) {
    threshold = threshold - min(LEAST_BOOST_HYSTERESIS_KPA, calibration.leastBoostKpa);
  }
  state.boostWanted = state.targetKpa >= threshold;
  return state.boostWanted;
}
