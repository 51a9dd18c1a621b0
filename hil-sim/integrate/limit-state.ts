// Bounds that no sensible run reaches: they keep a run finite after absurd parameters or states.
import type { PlantState } from "../plant/plant-state.ts";

/** What the bounds had to correct. */
export interface StepCounts {
  /** Values moved back to a bound; NaN counts too. */
  clamps: number;
  /** Values that were not numbers; the run is then worth nothing. */
  notANumber: number;
}

export function newStepCounts(): StepCounts {
  return { clamps: 0, notANumber: 0 };
}

/** Limits every state in place; NaN becomes the lower bound. The gate's end stops belong to the plant and are not counted. */
export function limitState(state: PlantState, counts: StepCounts): void {
  if (state.wastegateOpening < 0) state.wastegateOpening = 0;
  if (state.wastegateOpening > 1) state.wastegateOpening = 1;
  if (gasInBounds(state) && motionInBounds(state)) return;
  for (const [name, low, high] of BOUNDS) state[name] = limited(state[name], low, high, counts);
}

const BOUNDS: readonly (readonly [keyof PlantState, number, number])[] = [
  ["boostPressure", 2e3, 8e5],
  ["intakePressure", 2e3, 8e5],
  ["exhaustPressure", 2e3, 15e5],
  ["outletPressure", 2e3, 10e5],
  ["turboSpeed", 0, 4e4],
  ["compressorFlow", -2, 3],
  ["boostTemperature", 200, 800],
  ["inletTemperature", 200, 800],
  ["exhaustTemperature", 200, 1800],
  ["wallTemperature", 200, 1800],
  ["wastegateOpening", 0, 1],
  ["bypassOpening", 0, 1],
  ["throttleOpening", 0, 1],
  ["engineSpeed", 0, 2000],
];

/** The usual case of `BOUNDS`, without a call per state: it runs every step. False for NaN. */
function gasInBounds(state: PlantState): boolean {
  return (
    state.boostPressure >= 2e3 &&
    state.boostPressure <= 8e5 &&
    state.intakePressure >= 2e3 &&
    state.intakePressure <= 8e5 &&
    state.exhaustPressure >= 2e3 &&
    state.exhaustPressure <= 15e5 &&
    state.outletPressure >= 2e3 &&
    state.outletPressure <= 10e5 &&
    state.boostTemperature >= 200 &&
    state.boostTemperature <= 800 &&
    state.inletTemperature >= 200 &&
    state.inletTemperature <= 800 &&
    state.exhaustTemperature >= 200 &&
    state.exhaustTemperature <= 1800 &&
    state.wallTemperature >= 200 &&
    state.wallTemperature <= 1800
  );
}

function motionInBounds(state: PlantState): boolean {
  return (
    state.turboSpeed >= 0 &&
    state.turboSpeed <= 4e4 &&
    state.compressorFlow >= -2 &&
    state.compressorFlow <= 3 &&
    state.wastegateOpening >= 0 &&
    state.wastegateOpening <= 1 &&
    state.bypassOpening >= 0 &&
    state.bypassOpening <= 1 &&
    state.throttleOpening >= 0 &&
    state.throttleOpening <= 1 &&
    state.engineSpeed >= 0 &&
    state.engineSpeed <= 2000
  );
}

function limited(value: number, low: number, high: number, counts: StepCounts): number {
  if (value >= low && value <= high) return value;
  counts.clamps += 1;
  if (value > high) return high;
  if (!(value < low)) counts.notANumber += 1;
  return low;
}
