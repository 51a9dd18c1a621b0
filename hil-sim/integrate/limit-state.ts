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

/** Limits every state in place; NaN becomes the lower bound. */
export function limitState(state: PlantState, counts: StepCounts): void {
  state.boostPressure = limited(state.boostPressure, 2e3, 8e5, counts);
  state.intakePressure = limited(state.intakePressure, 2e3, 8e5, counts);
  state.exhaustPressure = limited(state.exhaustPressure, 2e3, 15e5, counts);
  state.outletPressure = limited(state.outletPressure, 2e3, 10e5, counts);
  state.turboSpeed = limited(state.turboSpeed, 0, 4e4, counts);
  state.compressorFlow = limited(state.compressorFlow, -2, 3, counts);
  state.boostTemperature = limited(state.boostTemperature, 200, 800, counts);
  state.inletTemperature = limited(state.inletTemperature, 200, 800, counts);
  state.exhaustTemperature = limited(state.exhaustTemperature, 200, 1800, counts);
  state.wallTemperature = limited(state.wallTemperature, 200, 1800, counts);
  state.wastegateOpening = limited(endStopped(state.wastegateOpening), 0, 1, counts);
  state.bypassOpening = limited(state.bypassOpening, 0, 1, counts);
  state.throttleOpening = limited(state.throttleOpening, 0, 1, counts);
  state.engineSpeed = limited(state.engineSpeed, 0, 2000, counts);
}

function limited(value: number, low: number, high: number, counts: StepCounts): number {
  if (value >= low && value <= high) return value;
  counts.clamps += 1;
  if (value > high) return high;
  if (!(value < low)) counts.notANumber += 1;
  return low;
}

/** The gate's mechanical stops are part of the plant, not a correction; NaN passes. */
function endStopped(opening: number): number {
  return opening < 0 ? 0 : Math.min(opening, 1);
}
