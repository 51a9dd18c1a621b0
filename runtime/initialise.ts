import type { Calibration } from "./calibration.ts";
import type { Exchange } from "./exchange.ts";
import type { LowPassState } from "./low-pass.ts";
import type { RateCheckState, SignalState, StuckCheckState } from "./plausibility.ts";
import type { FastState, Measured, SlowState } from "./state.ts";
import type { Structure } from "./structure.ts";

function initialiseSignal(state: SignalState): void {
  state.lastGood = 0;
  state.hasGood = false;
  state.suspect = false;
  state.failed = false;
  state.suspectSteps = 0;
  state.goodSteps = 0;
}

function initialiseRateCheck(state: RateCheckState): void {
  state.anchor = 0;
  state.age = 0;
  state.primed = false;
}

function initialiseStuckCheck(state: StuckCheckState): void {
  state.lastRaw = 0;
  state.companionAnchor = 0;
  state.sameSteps = 0;
}

function initialiseLowPass(state: LowPassState): void {
  state.value = 0;
  state.primed = false;
}

function initialiseSlowSignals(structure: Structure, state: SlowState): void {
  initialiseSignal(state.engineSpeed);
  initialiseSignal(state.accelerator);
  initialiseSignal(state.boostPressure);
  initialiseSignal(state.ambientPressure);
  if (structure.engineSpeedRate) {
    initialiseRateCheck(state.engineSpeedRate);
  }
  if (structure.engineSpeedFilter) {
    initialiseLowPass(state.engineSpeedFilter);
  }
  if (structure.acceleratorRate) {
    initialiseRateCheck(state.acceleratorRate);
  }
  if (structure.acceleratorFilter) {
    initialiseLowPass(state.acceleratorFilter);
  }
  if (structure.boostPressureRate) {
    initialiseRateCheck(state.boostPressureRate);
  }
  if (structure.boostPressureStuck) {
    initialiseStuckCheck(state.boostPressureStuck);
  }
  if (structure.boostPressureFilter) {
    initialiseLowPass(state.boostPressureFilter);
  }
  if (structure.ambientPressureRate) {
    initialiseRateCheck(state.ambientPressureRate);
  }
  if (structure.ambientPressureFilter) {
    initialiseLowPass(state.ambientPressureFilter);
  }
}

function initialiseOptionalSignals(structure: Structure, state: SlowState): void {
  if (structure.airCompensation) {
    initialiseSignal(state.chargeTemperature);
    if (structure.chargeTemperatureRate) {
      initialiseRateCheck(state.chargeTemperatureRate);
    }
    if (structure.chargeTemperatureFilter) {
      initialiseLowPass(state.chargeTemperatureFilter);
    }
  }
  if (structure.boostCeilingRequest) {
    initialiseSignal(state.boostCeilingRequest);
    if (structure.boostCeilingRequestRate) {
      initialiseRateCheck(state.boostCeilingRequestRate);
    }
    if (structure.boostCeilingRequestFilter) {
      initialiseLowPass(state.boostCeilingRequestFilter);
    }
  }
}

function initialiseMeasured(structure: Structure, measured: Measured): void {
  measured.engineSpeedRpm = 0;
  measured.acceleratorRatio = 0;
  measured.boostPressureKpa = 0;
  measured.ambientPressureKpa = 0;
  if (structure.pressureRatioCeiling) {
    measured.lowestAmbientKpa = 0;
  }
  if (structure.airCompensation) {
    measured.chargeTemperatureK = 0;
  }
  if (structure.boostCeilingRequest) {
    measured.boostCeilingRequestKpa = 0;
  }
}

function initialiseSlow(structure: Structure, calibration: Calibration, state: SlowState): void {
  initialiseSlowSignals(structure, state);
  initialiseOptionalSignals(structure, state);
  initialiseMeasured(structure, state.measured);
  state.mode = "start";
  state.targetKpa = 0;
  state.boostWanted = false;
  if (structure.integral) {
    state.integralTerm = 0;
  }
  if (structure.derivative || structure.antiWindup === "conditional") {
    state.previousPressureKpa = 0;
    state.pressureRateKpaPerS = 0;
  }
  state.openingRatio = calibration.safeOpeningRatio;
}

function initialiseFloor(structure: Structure, state: FastState): void {
  if (structure.turboSpeedFilter) {
    initialiseLowPass(state.turboSpeedFilter);
  }
  for (let i = 0; i < structure.accelerationSteps; i++) {
    state.speedHistoryRpm[i] = 0;
  }
  state.speedHistoryNext = 0;
  state.speedHistoryFilled = false;
  state.guardIntegralTerm = 0;
  state.targetReductionKpa = 0;
}

function initialiseTrip(state: FastState): void {
  state.tripped = false;
  state.aboveCeilingSteps = 0;
  state.belowReleaseSteps = 0;
  state.trippedSteps = 0;
}

function initialiseFast(structure: Structure, state: FastState): void {
  if (structure.overspeedGuard) {
    initialiseSignal(state.turboSpeed);
    state.suspectGainRpm = 0;
    if (structure.turboSpeedRate) {
      initialiseRateCheck(state.turboSpeedRate);
    }
    if (structure.turboSpeedStuck) {
      initialiseStuckCheck(state.turboSpeedStuck);
    }
    if (structure.proportionalGuard) {
      initialiseFloor(structure, state);
    }
    if (structure.trip) {
      initialiseTrip(state);
    }
  }
}

/** Sets both states and the exchange as after power-on: gate at its safe opening, nothing tripped, no signal known. */
export function initialise(
  structure: Structure,
  calibration: Calibration,
  slow: SlowState,
  fast: FastState,
  exchange: Exchange,
): void {
  initialiseSlow(structure, calibration, slow);
  initialiseFast(structure, fast);
  exchange.wantedOpeningRatio = calibration.safeOpeningRatio;
  exchange.failSafe = false;
  if (structure.overspeedGuard) {
    exchange.acceleratorRatio = 0;
    exchange.boostPressureKpa = 0;
    exchange.guardActive = false;
    exchange.tripped = false;
    exchange.turboSpeedReady = false;
    exchange.turboSpeedFailed = false;
    if (structure.proportionalGuard) {
      exchange.guardBase = 0;
      exchange.guardFloor = 0;
      exchange.targetReductionKpa = 0;
    }
  }
}
