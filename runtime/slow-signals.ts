import type { Calibration } from "./calibration.ts";
import { lowPass } from "./low-pass.ts";
import { debounce, movedTooFast, outsideRange, standsStill, usable } from "./plausibility.ts";
import type { SlowInput } from "./ports.ts";
import type { SlowState } from "./state.ts";
import type { Structure } from "./structure.ts";
import type { Flag, Real } from "./types.ts";

/** Engine speed, rpm; the substitute while it is not usable. */
export function conditionEngineSpeed(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  raw: Real,
): Real {
  let suspect: Flag = outsideRange(calibration.engineSpeed, raw);
  if (structure.engineSpeedRate) {
    const tooFast = movedTooFast(
      calibration.engineSpeedRate,
      state.engineSpeedRate,
      raw,
      suspect,
      state.engineSpeed.failed,
    );
    suspect = suspect || tooFast;
  }
  debounce(calibration.engineSpeed, state.engineSpeed, raw, suspect);
  let value: Real = calibration.engineSpeedOtherwiseRpm;
  if (usable(state.engineSpeed)) {
    value = state.engineSpeed.lastGood;
  }
  if (structure.engineSpeedFilter) {
    value = lowPass(state.engineSpeedFilter, value, calibration.engineSpeedFilterS, structure.stepS);
  }
  return value;
}

/** Accelerator, 0..1; the substitute while it is not usable. */
export function conditionAccelerator(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  raw: Real,
): Real {
  let suspect: Flag = outsideRange(calibration.accelerator, raw);
  if (structure.acceleratorRate) {
    const tooFast = movedTooFast(
      calibration.acceleratorRate,
      state.acceleratorRate,
      raw,
      suspect,
      state.accelerator.failed,
    );
    suspect = suspect || tooFast;
  }
  debounce(calibration.accelerator, state.accelerator, raw, suspect);
  let value: Real = calibration.acceleratorOtherwiseRatio;
  if (usable(state.accelerator)) {
    value = state.accelerator.lastGood;
  }
  if (structure.acceleratorFilter) {
    value = lowPass(state.acceleratorFilter, value, calibration.acceleratorFilterS, structure.stepS);
  }
  return value;
}

/**
 * Boost pressure, kPa; the last good sample while it is doubted (the mode decides what happens once it has failed).
 * A frozen sensor is recognised by the target having moved meanwhile.
 */
export function conditionBoostPressure(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  raw: Real,
): Real {
  let suspect: Flag = outsideRange(calibration.boostPressure, raw);
  if (structure.boostPressureRate) {
    const tooFast = movedTooFast(
      calibration.boostPressureRate,
      state.boostPressureRate,
      raw,
      suspect,
      state.boostPressure.failed,
    );
    suspect = suspect || tooFast;
  }
  if (structure.boostPressureStuck) {
    if (!suspect) {
      suspect = standsStill(calibration.boostPressureStuck, state.boostPressureStuck, raw, state.targetKpa);
    }
  }
  debounce(calibration.boostPressure, state.boostPressure, raw, suspect);
  let value: Real = calibration.boostPressure.low;
  if (state.boostPressure.hasGood) {
    value = state.boostPressure.lastGood;
  }
  if (structure.boostPressureFilter) {
    if (state.boostPressure.hasGood) {
      value = lowPass(state.boostPressureFilter, value, calibration.boostPressureFilterS, structure.stepS);
    }
  }
  return value;
}

/** Ambient pressure, kPa; the substitute while it is not usable. */
export function conditionAmbientPressure(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  raw: Real,
): Real {
  let suspect: Flag = outsideRange(calibration.ambientPressure, raw);
  if (structure.ambientPressureRate) {
    const tooFast = movedTooFast(
      calibration.ambientPressureRate,
      state.ambientPressureRate,
      raw,
      suspect,
      state.ambientPressure.failed,
    );
    suspect = suspect || tooFast;
  }
  debounce(calibration.ambientPressure, state.ambientPressure, raw, suspect);
  let value: Real = calibration.ambientPressureOtherwiseKpa;
  if (usable(state.ambientPressure)) {
    value = state.ambientPressure.lastGood;
  }
  if (structure.ambientPressureFilter) {
    value = lowPass(state.ambientPressureFilter, value, calibration.ambientPressureFilterS, structure.stepS);
  }
  return value;
}

/** Charge temperature, K; the reference temperature, that is no compensation, while it is not usable. */
export function conditionChargeTemperature(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  raw: Real,
): Real {
  let suspect: Flag = outsideRange(calibration.chargeTemperature, raw);
  if (structure.chargeTemperatureRate) {
    const tooFast = movedTooFast(
      calibration.chargeTemperatureRate,
      state.chargeTemperatureRate,
      raw,
      suspect,
      state.chargeTemperature.failed,
    );
    suspect = suspect || tooFast;
  }
  debounce(calibration.chargeTemperature, state.chargeTemperature, raw, suspect);
  let value: Real = calibration.airReferenceTemperatureK;
  if (usable(state.chargeTemperature)) {
    value = state.chargeTemperature.lastGood;
  }
  if (structure.chargeTemperatureFilter) {
    value = lowPass(
      state.chargeTemperatureFilter,
      value,
      calibration.chargeTemperatureFilterS,
      structure.stepS,
    );
  }
  return value;
}

/** Boost ceiling asked for by other functions, kPa; the substitute while it is not usable. */
export function conditionBoostCeilingRequest(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  raw: Real,
): Real {
  let suspect: Flag = outsideRange(calibration.boostCeilingRequest, raw);
  if (structure.boostCeilingRequestRate) {
    const tooFast = movedTooFast(
      calibration.boostCeilingRequestRate,
      state.boostCeilingRequestRate,
      raw,
      suspect,
      state.boostCeilingRequest.failed,
    );
    suspect = suspect || tooFast;
  }
  debounce(calibration.boostCeilingRequest, state.boostCeilingRequest, raw, suspect);
  let value: Real = calibration.boostCeilingRequestOtherwiseKpa;
  if (usable(state.boostCeilingRequest)) {
    value = state.boostCeilingRequest.lastGood;
  }
  if (structure.boostCeilingRequestFilter) {
    value = lowPass(
      state.boostCeilingRequestFilter,
      value,
      calibration.boostCeilingRequestFilterS,
      structure.stepS,
    );
  }
  return value;
}

/** Conditions every signal of the slow step into `state.measured`. */
export function conditionSlowSignals(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  input: SlowInput,
): void {
  state.measured.engineSpeedRpm = conditionEngineSpeed(structure, calibration, state, input.engineSpeedRpm);
  state.measured.acceleratorRatio = conditionAccelerator(
    structure,
    calibration,
    state,
    input.acceleratorRatio,
  );
  state.measured.boostPressureKpa = conditionBoostPressure(
    structure,
    calibration,
    state,
    input.boostPressureKpa,
  );
  const ambient = conditionAmbientPressure(structure, calibration, state, input.ambientPressureKpa);
  state.measured.ambientPressureKpa = ambient;
  if (structure.pressureRatioCeiling) {
    state.measured.lowestAmbientKpa = ambient;
    if (state.ambientPressure.failed) {
      state.measured.lowestAmbientKpa = calibration.ambientPressure.low;
    }
  }
  if (structure.airCompensation) {
    const charge = conditionChargeTemperature(structure, calibration, state, input.chargeTemperatureK);
    state.measured.chargeTemperatureK = charge;
  }
  if (structure.boostCeilingRequest) {
    const request = conditionBoostCeilingRequest(structure, calibration, state, input.boostCeilingRequestKpa);
    state.measured.boostCeilingRequestKpa = request;
  }
}
