import { abs, max, same, toReal } from "./intrinsics.ts";
import type { Count, Flag, Real } from "./types.ts";

/** Believable range of a signal and its debounce, in steps of its task. */
export interface SignalCalibration {
  readonly low: Real;
  readonly high: Real;
  readonly afterSteps: Count;
  readonly healsAfterSteps: Count;
}

export interface SignalState {
  lastGood: Real;
  hasGood: Flag;
  suspect: Flag;
  failed: Flag;
  suspectSteps: Count;
  goodSteps: Count;
}

export interface RateCheckCalibration {
  /** Largest believable change over the window, in the signal's unit. */
  readonly mostChange: Real;
  readonly windowSteps: Count;
}

export interface RateCheckState {
  anchor: Real;
  age: Count;
  primed: Flag;
}

export interface StuckCheckCalibration {
  readonly steps: Count;
  /** How far the companion signal must have moved, in the companion's unit. */
  readonly moved: Real;
}

export interface StuckCheckState {
  lastRaw: Real;
  companionAnchor: Real;
  sameSteps: Count;
}

/** Not a number, infinite, or outside the believable range. */
export function outsideRange(calibration: SignalCalibration, raw: Real): Flag {
  return !(raw >= calibration.low && raw <= calibration.high);
}

/** Steps without a sample are counted up to here. */
export const LONGEST_GAP_STEPS: Count = 1000000;

/** Largest believable change since the anchor: one window's worth, or more when samples were missing for longer. */
function believableChange(calibration: RateCheckCalibration, state: RateCheckState): Real {
  return calibration.mostChange * max(toReal(state.age) / toReal(calibration.windowSteps), 1);
}

/**
 * Changed faster than believable since an accepted sample about one window ago, so that one quantum of a coarse sensor
 * in one step is no alarm. A jump stays doubted, and its level is not accepted, until the signal has failed; from then
 * on the believable change grows with time, so that a sensor that came back elsewhere can heal.
 * `outside`: this step has no believable sample; it only counts as time gone by.
 */
export function movedTooFast(
  calibration: RateCheckCalibration,
  state: RateCheckState,
  raw: Real,
  outside: Flag,
  failed: Flag,
): Flag {
  let tooFast: Flag = false;
  if (!outside) {
    tooFast = state.primed && abs(raw - state.anchor) > believableChange(calibration, state);
    if (!tooFast && (!state.primed || state.age >= calibration.windowSteps)) {
      state.anchor = raw;
      state.age = 0;
      state.primed = true;
    }
  }
  if ((!tooFast || failed) && state.age < LONGEST_GAP_STEPS) {
    state.age = state.age + 1;
  }
  return tooFast;
}

/**
 * The same reading for long while a companion signal moved: a frozen sensor. Call with finite samples only. A companion
 * that is not above zero is not known yet: no verdict until it is.
 */
export function standsStill(
  calibration: StuckCheckCalibration,
  state: StuckCheckState,
  raw: Real,
  companion: Real,
): Flag {
  if (!same(raw, state.lastRaw) || !(state.companionAnchor > 0)) {
    state.lastRaw = raw;
    state.companionAnchor = companion;
    state.sameSteps = 0;
  } else if (state.sameSteps < calibration.steps) {
    state.sameSteps = state.sameSteps + 1;
  }
  const moved = abs(companion - state.companionAnchor) > calibration.moved;
  return state.sameSteps >= calibration.steps && moved;
}

/**
 * Debounce: suspect for `afterSteps` makes the signal failed, good for `healsAfterSteps` makes it usable again; zero
 * means at once. While suspect the last good sample is kept. Counters stop at their limits, so they never wrap.
 */
export function debounce(calibration: SignalCalibration, state: SignalState, raw: Real, suspect: Flag): void {
  state.suspect = suspect;
  if (suspect) {
    state.goodSteps = 0;
    if (state.suspectSteps >= calibration.afterSteps) {
      state.failed = true;
    } else {
      state.suspectSteps = state.suspectSteps + 1;
    }
  } else {
    state.suspectSteps = 0;
    state.lastGood = raw;
    state.hasGood = true;
    if (state.failed) {
      if (state.goodSteps >= calibration.healsAfterSteps) {
        state.failed = false;
      } else {
        state.goodSteps = state.goodSteps + 1;
      }
    }
  }
}

/** There has been a good sample and the signal has not failed. */
export function usable(state: SignalState): Flag {
  return state.hasGood && !state.failed;
}
