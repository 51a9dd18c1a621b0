import { coordinateOf, openingFor } from "./arbitration.ts";
import type { Calibration } from "./calibration.ts";
import type { Exchange } from "./exchange.ts";
import {
  filteredRate,
  mayIntegrate,
  nextIntegral,
  normalise,
  proportionalTerm,
  scheduledGauge,
} from "./feedback.ts";
import { feedforwardFor } from "./feedforward.ts";
import { derivativeGainAt, integralGainAt, proportionalGainAt, scheduleSignal } from "./gains.ts";
import { clamp, max, min } from "./intrinsics.ts";
import { chooseMode } from "./modes.ts";
import type { SlowInput, SlowOutput } from "./ports.ts";
import { rateLimit } from "./rate-limit.ts";
import {
  conditionAccelerator,
  conditionAmbientPressure,
  conditionBoostCeilingRequest,
  conditionBoostPressure,
  conditionChargeTemperature,
  conditionEngineSpeed,
} from "./slow-signals.ts";
import type { SlowState } from "./state.ts";
import type { Structure } from "./structure.ts";
import { airFactor, boostCeiling, requestedBoost } from "./target.ts";
import type { Flag, Real } from "./types.ts";

/** Time in which the integral term fades while no boost is wanted, s. */
export const INTEGRAL_FADE_S: Real = 0.2;

/**
 * The slow step: the boost loop. Condition, target, feedforward, feedback, arbitration, mode, commit, in this order.
 */
export function stepBoost(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  exchange: Exchange,
  input: SlowInput,
  output: SlowOutput,
): void {
  let guardFloor: Real = 0;
  let guardActive: Flag = false;
  let reduction: Real = 0;
  let speedReady: Flag = true;
  let speedFailed: Flag = false;
  if (structure.overspeedGuard) {
    guardActive = exchange.guardActive;
    speedReady = exchange.turboSpeedReady;
    speedFailed = exchange.turboSpeedFailed;
    if (structure.proportionalGuard) {
      guardFloor = exchange.guardFloor;
      reduction = exchange.targetReductionKpa;
    }
  }

  // 1 condition
  const engineSpeed = conditionEngineSpeed(structure, calibration, state, input.engineSpeedRpm);
  const accelerator = conditionAccelerator(structure, calibration, state, input.acceleratorRatio);
  const pressure = conditionBoostPressure(structure, calibration, state, input.boostPressureKpa);
  const ambient = conditionAmbientPressure(structure, calibration, state, input.ambientPressureKpa);
  let lowestAmbient: Real = ambient;
  if (state.ambientPressure.failed) {
    lowestAmbient = calibration.ambientPressure.low;
  }
  let ceilingRequest: Real = calibration.boostCeilingKpa;
  if (structure.boostCeilingRequest) {
    ceilingRequest = conditionBoostCeilingRequest(
      structure,
      calibration,
      state,
      input.boostCeilingRequestKpa,
    );
  }
  const starting = state.mode === "start";

  // 2 target
  let requested: Real = requestedBoost(structure, calibration, accelerator, engineSpeed, ambient);
  if (structure.airCompensation) {
    const charge = conditionChargeTemperature(structure, calibration, state, input.chargeTemperatureK);
    requested = requested * airFactor(structure, calibration, charge, ambient);
  }
  const wanted = min(requested, boostCeiling(structure, calibration, lowestAmbient, ceilingRequest));
  let previousTarget: Real = state.targetKpa;
  if (starting) {
    previousTarget = pressure;
  }
  const target = rateLimit(
    previousTarget,
    wanted - reduction,
    calibration.targetRiseKpaPerS,
    calibration.targetFallKpaPerS,
    structure.stepS,
  );
  const boostWanted = target >= ambient + calibration.leastBoostKpa;

  // 3 feedforward
  const feedforward = feedforwardFor(structure, calibration, target, ambient, engineSpeed);

  // 4 feedback
  const schedule = scheduleSignal(structure, engineSpeed, target);
  const gauge = scheduledGauge(target, ambient);
  const proportional = proportionalTerm(
    structure,
    proportionalGainAt(structure, calibration, schedule),
    calibration.setpointWeightRatio,
    pressure,
    target,
    ambient,
    gauge,
  );
  let rate: Real = 0;
  if (structure.derivative || structure.antiWindup === "conditional") {
    let previousPressure: Real = state.previousPressureKpa;
    if (starting) {
      previousPressure = pressure;
    }
    rate = filteredRate(
      state.pressureRateKpaPerS,
      previousPressure,
      pressure,
      calibration.derivativeFilterS,
      structure.stepS,
    );
    state.previousPressureKpa = pressure;
    state.pressureRateKpaPerS = rate;
  }
  let derivative: Real = 0;
  if (structure.derivative) {
    derivative = derivativeGainAt(structure, calibration, schedule) * normalise(structure, rate, gauge);
  }
  let integral: Real = 0;
  if (structure.integral) {
    integral = state.integralTerm;
  }

  // 5 arbitration
  const unlimited = feedforward + proportional + integral + derivative;
  const loopOpening = openingFor(structure, calibration, unlimited);
  const failed = state.boostPressure.failed || speedFailed;
  const ready = state.boostPressure.hasGood && speedReady;
  const mode = chooseMode(failed, ready, guardActive, boostWanted);
  let opening: Real = loopOpening;
  if (mode === "start" || mode === "fail_safe") {
    opening = calibration.safeOpeningRatio;
  } else {
    let wantedOpening: Real = loopOpening;
    if (!boostWanted) {
      wantedOpening = calibration.restOpeningRatio;
    }
    opening = rateLimit(
      state.openingRatio,
      wantedOpening,
      calibration.slewOpenRatioPerS,
      calibration.slewCloseRatioPerS,
      structure.stepS,
    );
  }

  // 6 anti-windup
  if (structure.integral) {
    const error = normalise(structure, pressure - target, gauge);
    const integralRate = integralGainAt(structure, calibration, schedule) * error;
    let allowed: Flag = true;
    if (structure.antiWindup === "conditional") {
      const closed = loopOpening <= calibration.openingLowRatio;
      const open = loopOpening >= calibration.openingHighRatio;
      const normalisedRate = normalise(structure, rate, gauge);
      allowed = mayIntegrate(calibration, error, normalisedRate, closed, open, guardActive);
    }
    let applied: Real = unlimited;
    if (structure.antiWindup === "back_calculation") {
      applied = max(coordinateOf(structure, calibration, opening), guardFloor);
    }
    let next: Real = nextIntegral(
      structure,
      calibration,
      integral,
      integralRate,
      allowed,
      unlimited,
      applied,
    );
    if (!boostWanted || mode === "start" || mode === "fail_safe") {
      next = integral - integral * (structure.stepS / (INTEGRAL_FADE_S + structure.stepS));
    }
    state.integralTerm = clamp(next, calibration.trimLow, calibration.trimHigh);
  }

  state.mode = mode;
  state.targetKpa = target;
  state.openingRatio = opening;

  output.boostWantedKpa = wanted;
  output.boostTargetKpa = target;
  output.mode = mode;
  output.feedforwardTerm = feedforward;
  output.proportionalTerm = proportional;
  output.integralTerm = integral;
  output.derivativeTerm = derivative;
  output.wantedOpeningRatio = opening;
  output.engineSpeedFailed = state.engineSpeed.failed;
  output.acceleratorFailed = state.accelerator.failed;
  output.boostPressureFailed = state.boostPressure.failed;
  output.ambientPressureFailed = state.ambientPressure.failed;

  // 7 commit: the flag before its value when things worsen, after it when they heal, so every prefix is safe
  if (structure.overspeedGuard) {
    if (structure.proportionalGuard) {
      exchange.guardBase = feedforwardFor(
        structure,
        calibration,
        calibration.guardSafePressureRatio * ambient,
        ambient,
        engineSpeed,
      );
    }
    exchange.acceleratorRatio = accelerator;
    exchange.boostPressureKpa = pressure;
  }
  if (failed) {
    exchange.failSafe = true;
    exchange.wantedOpeningRatio = opening;
  } else {
    exchange.wantedOpeningRatio = opening;
    exchange.failSafe = false;
  }
}
