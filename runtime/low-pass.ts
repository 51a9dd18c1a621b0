import { clamp, max, min } from "./intrinsics.ts";
import type { Flag, Real } from "./types.ts";

export interface LowPassState {
  value: Real;
  primed: Flag;
}

/**
 * First-order low-pass filter by the backward Euler rule; starts at its first sample.
 *   y[k] = y[k-1] + (x[k] - y[k-1]) dt / (tau + dt)
 * The result stays between y[k-1] and x[k]; the clamp removes the one rounding that could leave that hull.
 */
export function lowPass(state: LowPassState, x: Real, timeConstantS: Real, stepS: Real): Real {
  if (!state.primed) {
    state.value = x;
    state.primed = true;
  }
  const y = state.value;
  const moved = y + (x - y) * (stepS / (timeConstantS + stepS));
  state.value = clamp(moved, min(x, y), max(x, y));
  return state.value;
}
