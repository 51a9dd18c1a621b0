import { type ControllerInput, type ControllerOutput, MODES } from "../../hil-sim/index.ts";
import type { FastOutput, SlowOutput } from "../../runtime/index.ts";

export function newControllerInput(): ControllerInput {
  return {
    engineSpeedRpm: 0,
    acceleratorRatio: 0,
    boostPressureKpa: 0,
    ambientPressureKpa: 0,
    chargeTemperatureK: 0,
    inletTemperatureK: 0,
    manifoldPressureKpa: 0,
    boostCeilingRequestKpa: 0,
    turboSpeedRpm: 0,
  };
}

/** Before the first step: no limit, no trip; the gate's own first command follows with the first fast step. */
export function newControllerOutput(): ControllerOutput {
  return {
    wastegateCommandRatio: 0,
    torqueLimitRatio: 1,
    bypassCommandRatio: 0,
    fuelCutPermitted: true,
    boostWantedKpa: 0,
    boostTargetKpa: 0,
    mode: 0,
    tripped: false,
    guardActive: false,
    failSafe: false,
    feedforwardTerm: 0,
    proportionalTerm: 0,
    integralTerm: 0,
    derivativeTerm: 0,
    guardFloor: 0,
  };
}

export function copySlowOutput(from: SlowOutput, to: ControllerOutput): void {
  to.boostWantedKpa = from.boostWantedKpa;
  to.boostTargetKpa = from.boostTargetKpa;
  to.mode = MODES.indexOf(from.mode);
  to.feedforwardTerm = from.feedforwardTerm;
  to.proportionalTerm = from.proportionalTerm;
  to.integralTerm = from.integralTerm;
  to.derivativeTerm = from.derivativeTerm;
}

export function copyFastOutput(from: FastOutput, to: ControllerOutput): void {
  to.wastegateCommandRatio = from.wastegateCommandRatio;
  to.torqueLimitRatio = from.torqueLimitRatio;
  to.tripped = from.overLimit;
  to.guardActive = from.guardActive;
  to.failSafe = from.failSafe;
  to.guardFloor = from.guardFloor;
}
