import { limitOpening, openingFor } from "./arbitration.ts";
import type { Calibration } from "./calibration.ts";
import type { Exchange } from "./exchange.ts";
import { max, min } from "./intrinsics.ts";
import { usable } from "./plausibility.ts";
import type { FastInput, FastOutput } from "./ports.ts";
import { guardFloor, predictedSpeed, targetReduction } from "./proportional-guard.ts";
import type { FastState } from "./state.ts";
import type { Structure } from "./structure.ts";
import { latchTrip } from "./trip.ts";
import { guardSpeed, judgeTurboSpeed, overMechanicalLimit } from "./turbo-speed.ts";
import type { Flag, Real } from "./types.ts";

/**
 * The fast step: watches the turbo's speed and has the last word on gate and torque. Call it every guard step, before
 * the slow step when both fall together; it may interrupt the slow step anywhere.
 */
export function stepGuard(
  structure: Structure,
  calibration: Calibration,
  state: FastState,
  exchange: Exchange,
  input: FastInput,
  output: FastOutput,
): void {
  const wantedOpening = exchange.wantedOpeningRatio;
  let failSafe: Flag = exchange.failSafe;
  let command: Real = wantedOpening;
  let torqueLimit: Real = 1;

  if (structure.overspeedGuard) {
    const raw = input.turboSpeedRpm;
    const overMechanical = overMechanicalLimit(calibration, state, raw);
    judgeTurboSpeed(structure, calibration, state, raw, exchange.boostPressureKpa);
    const speed = guardSpeed(calibration, state, raw);
    failSafe = failSafe || state.turboSpeed.failed;
    if (failSafe) {
      command = calibration.safeOpeningRatio;
      torqueLimit = calibration.failSafeTorqueRatio;
    }

    let guardActive: Flag = false;
    if (structure.proportionalGuard) {
      const base = exchange.guardBase;
      const predicted = predictedSpeed(structure, calibration, state, speed);
      const floor = guardFloor(structure, calibration, state, base, predicted, speed);
      const floorOpening = openingFor(structure, calibration, floor);
      guardActive = floorOpening > wantedOpening;
      command = max(command, floorOpening);
      exchange.guardFloor = floor;
      exchange.targetReductionKpa = targetReduction(structure, calibration, state, predicted);
      output.guardFloor = floor;
    }
    command = limitOpening(calibration, command);

    let overLimit: Flag = overMechanical;
    if (structure.trip) {
      overLimit = latchTrip(calibration, state, speed, overMechanical, exchange.acceleratorRatio);
    }
    if (overLimit) {
      command = calibration.openingHighRatio;
      torqueLimit = min(torqueLimit, calibration.tripTorqueRatio);
      guardActive = true;
    }
    exchange.guardActive = guardActive;
    exchange.tripped = overLimit;
    exchange.turboSpeedReady = usable(state.turboSpeed);
    exchange.turboSpeedFailed = state.turboSpeed.failed;
    output.overLimit = overLimit;
    output.guardActive = guardActive;
    output.turboSpeedSuspect = state.turboSpeed.suspect;
    output.turboSpeedFailed = state.turboSpeed.failed;
  } else {
    if (failSafe) {
      command = calibration.safeOpeningRatio;
      torqueLimit = calibration.failSafeTorqueRatio;
    }
    command = limitOpening(calibration, command);
  }

  output.wastegateCommandRatio = command;
  output.torqueLimitRatio = torqueLimit;
  output.failSafe = failSafe;
}
