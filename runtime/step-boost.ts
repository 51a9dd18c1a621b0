import { openingFor } from "./arbitration.ts";
import type { Calibration } from "./calibration.ts";
import type { Exchange } from "./exchange.ts";
import { sumOfTerms } from "./feedback.ts";
import { feedforwardFor } from "./feedforward.ts";
import { fadeIntegral, updateIntegral } from "./integral.ts";
import { min } from "./intrinsics.ts";
import { chooseMode, type Mode } from "./modes.ts";
import { usable } from "./plausibility.ts";
import type { SlowInput, SlowOutput } from "./ports.ts";
import { rateLimit } from "./rate-limit.ts";
import { conditionSlowSignals } from "./slow-signals.ts";
import type { SlowState } from "./state.ts";
import type { Structure } from "./structure.ts";
import { boostCeiling, followTarget, requestedBoost, wantsBoost } from "./target.ts";
import type { Flag, Real } from "./types.ts";

/**
 * Opening the slow step commands: safe, at rest, or the loop's, the last two within the actuator's slew. While a trip
 * holds the gate open it stays there, so that the release closes the gate within the slew as well.
 */
function commandedOpening(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  mode: Mode,
  boostWanted: Flag,
  tripped: Flag,
  loopOpeningRatio: Real,
): Real {
  let wanted: Real = loopOpeningRatio;
  if (!boostWanted) {
    wanted = calibration.restOpeningRatio;
  }
  let opening: Real = rateLimit(
    state.openingRatio,
    wanted,
    calibration.slewOpenRatioPerS,
    calibration.slewCloseRatioPerS,
    structure.stepS,
  );
  if (mode === "start" || mode === "fail_safe") {
    opening = calibration.safeOpeningRatio;
  }
  if (tripped) {
    opening = calibration.openingHighRatio;
  }
  return opening;
}

/** Sets the outputs that a calibration engineer plots beside the terms. */
function report(state: SlowState, output: SlowOutput): void {
  output.boostTargetKpa = state.targetKpa;
  output.mode = state.mode;
  output.wantedOpeningRatio = state.openingRatio;
  output.engineSpeedFailed = state.engineSpeed.failed;
  output.acceleratorFailed = state.accelerator.failed;
  output.boostPressureFailed = state.boostPressure.failed;
  output.ambientPressureFailed = state.ambientPressure.failed;
}

/** Engine speed for the foot of the guard's floor, rpm: the highest of the table while the sensor has failed. */
function guardEngineSpeed(structure: Structure, calibration: Calibration, state: SlowState): Real {
  let speed: Real = state.measured.engineSpeedRpm;
  if (structure.feedforward !== "none") {
    if (state.engineSpeed.failed) {
      speed = calibration.feedforward.columns[calibration.feedforward.columns.length - 1];
    }
  }
  return speed;
}

/**
 * Hands over to the fast step. The flag goes before its value when things worsen and after it when they heal, so the
 * fast step may interrupt anywhere: every prefix of these lines is safe.
 */
function commit(
  structure: Structure,
  calibration: Calibration,
  state: SlowState,
  exchange: Exchange,
  failed: Flag,
): void {
  if (structure.overspeedGuard) {
    if (structure.proportionalGuard) {
      const ambient = state.measured.ambientPressureKpa;
      const safe = calibration.guardSafePressureRatio * ambient;
      exchange.guardBase = feedforwardFor(
        structure,
        calibration,
        safe,
        ambient,
        guardEngineSpeed(structure, calibration, state),
      );
    }
    let accelerator: Real = 1;
    if (usable(state.accelerator)) {
      accelerator = state.measured.acceleratorRatio;
    }
    exchange.acceleratorRatio = accelerator;
    exchange.boostPressureKpa = state.measured.boostPressureKpa;
  }
  if (failed) {
    exchange.failSafe = true;
    exchange.wantedOpeningRatio = state.openingRatio;
  } else {
    exchange.wantedOpeningRatio = state.openingRatio;
    exchange.failSafe = false;
  }
}

/**
 * The slow step: the boost loop. Condition, target, feedforward and feedback, mode, arbitration, anti-windup, commit.
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
  let tripped: Flag = false;
  let reduction: Real = 0;
  let speedReady: Flag = true;
  let speedFailed: Flag = false;
  if (structure.overspeedGuard) {
    guardActive = exchange.guardActive;
    tripped = exchange.tripped;
    speedReady = exchange.turboSpeedReady;
    speedFailed = exchange.turboSpeedFailed;
    if (structure.proportionalGuard) {
      guardFloor = exchange.guardFloor;
      reduction = exchange.targetReductionKpa;
    }
  }
  conditionSlowSignals(structure, calibration, state, input);

  const requested = requestedBoost(structure, calibration, state.measured);
  const wanted = min(requested, boostCeiling(structure, calibration, state.measured));
  output.boostWantedKpa = wanted;
  const restart = tripped || state.mode === "start" || state.mode === "fail_safe";
  const target = followTarget(structure, calibration, state, wanted, reduction, restart);
  const boostWanted = wantsBoost(calibration, state);

  const unlimited = sumOfTerms(structure, calibration, state, target, output);
  const loopOpening = openingFor(structure, calibration, unlimited);

  const failed = state.boostPressure.failed || speedFailed;
  const ready = state.boostPressure.hasGood && speedReady;
  state.mode = chooseMode(failed, ready, guardActive, boostWanted);
  state.openingRatio = commandedOpening(
    structure,
    calibration,
    state,
    state.mode,
    boostWanted,
    tripped,
    loopOpening,
  );

  if (structure.integral) {
    if (boostWanted && ready && !failed && !tripped) {
      updateIntegral(structure, calibration, state, unlimited, loopOpening, guardFloor, guardActive);
    } else {
      fadeIntegral(structure, calibration, state);
    }
  }
  report(state, output);
  commit(structure, calibration, state, exchange, failed);
}
