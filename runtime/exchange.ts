import type { Flag, Real } from "./types.ts";

/**
 * Between the two tasks. The fast step may interrupt the slow one anywhere, so every field has one writer, fits one
 * 32-bit access, is read once per step into a local, and is committed last. No lock is needed.
 */
export interface Exchange {
  // written by the slow step
  wantedOpeningRatio: Real;
  failSafe: Flag;
  /** Coordinate that holds the safe pressure ratio at this engine speed: the foot of the guard's floor. */
  guardBase: Real;
  acceleratorRatio: Real;
  boostPressureKpa: Real;

  // written by the fast step
  guardFloor: Real;
  guardActive: Flag;
  targetReductionKpa: Real;
  turboSpeedReady: Flag;
  turboSpeedFailed: Flag;
}
