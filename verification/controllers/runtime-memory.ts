import type { Exchange, FastOutput, FastState, SlowOutput, SlowState } from "../../runtime/index.ts";

const signal = () => ({
  lastGood: 0,
  hasGood: false,
  suspect: false,
  failed: false,
  suspectSteps: 0,
  goodSteps: 0,
});
const rateCheck = () => ({ anchor: 0, age: 0, primed: false });
const stuckCheck = () => ({ lastRaw: 0, companionAnchor: 0, sameSteps: 0 });
const lowPass = () => ({ value: 0, primed: false });

/** Memory of the runtime's slow step, to be set by its `initialise`. */
export function newSlowState(): SlowState {
  return {
    measured: {
      engineSpeedRpm: 0,
      acceleratorRatio: 0,
      boostPressureKpa: 0,
      ambientPressureKpa: 0,
      lowestAmbientKpa: 0,
      chargeTemperatureK: 0,
      boostCeilingRequestKpa: 0,
    },
    engineSpeed: signal(),
    engineSpeedRate: rateCheck(),
    engineSpeedFilter: lowPass(),
    accelerator: signal(),
    acceleratorRate: rateCheck(),
    acceleratorFilter: lowPass(),
    boostPressure: signal(),
    boostPressureRate: rateCheck(),
    boostPressureStuck: stuckCheck(),
    boostPressureFilter: lowPass(),
    ambientPressure: signal(),
    ambientPressureRate: rateCheck(),
    ambientPressureFilter: lowPass(),
    chargeTemperature: signal(),
    chargeTemperatureRate: rateCheck(),
    chargeTemperatureFilter: lowPass(),
    boostCeilingRequest: signal(),
    boostCeilingRequestRate: rateCheck(),
    boostCeilingRequestFilter: lowPass(),
    mode: "start",
    targetKpa: 0,
    boostWanted: false,
    integralTerm: 0,
    previousPressureKpa: 0,
    pressureRateKpaPerS: 0,
    openingRatio: 0,
  };
}

/** Memory of the runtime's fast step; the history holds one speed per fast step of the acceleration window. */
export function newFastState(accelerationSteps: number): FastState {
  return {
    turboSpeed: signal(),
    turboSpeedRate: rateCheck(),
    turboSpeedStuck: stuckCheck(),
    turboSpeedFilter: lowPass(),
    suspectGainRpm: 0,
    speedHistoryRpm: new Array<number>(accelerationSteps).fill(0),
    speedHistoryNext: 0,
    speedHistoryFilled: false,
    guardIntegralTerm: 0,
    targetReductionKpa: 0,
    tripped: false,
    aboveCeilingSteps: 0,
    belowReleaseSteps: 0,
    trippedSteps: 0,
  };
}

export function newExchange(): Exchange {
  return {
    wantedOpeningRatio: 0,
    failSafe: false,
    guardBase: 0,
    acceleratorRatio: 0,
    boostPressureKpa: 0,
    guardFloor: 0,
    guardActive: false,
    tripped: false,
    targetReductionKpa: 0,
    turboSpeedReady: false,
    turboSpeedFailed: false,
  };
}

export function newSlowOutput(): SlowOutput {
  return {
    boostWantedKpa: 0,
    boostTargetKpa: 0,
    mode: "start",
    feedforwardTerm: 0,
    proportionalTerm: 0,
    integralTerm: 0,
    derivativeTerm: 0,
    wantedOpeningRatio: 0,
    engineSpeedFailed: false,
    acceleratorFailed: false,
    boostPressureFailed: false,
    ambientPressureFailed: false,
  };
}

export function newFastOutput(): FastOutput {
  return {
    wastegateCommandRatio: 0,
    torqueLimitRatio: 1,
    overLimit: false,
    guardActive: false,
    failSafe: false,
    guardFloor: 0,
    turboSpeedSuspect: false,
    turboSpeedFailed: false,
  };
}
