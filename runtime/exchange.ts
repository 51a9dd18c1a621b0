import type { Flag, Real } from "./types.ts";

/**
 * Between the two tasks. The fast step may interrupt the slow one anywhere, never the other way round. Every field has
 * one writer, fits one 32-bit access and is read once per step; the slow step commits its fields last, in an order in
 * which every prefix is safe. No lock is needed.
 */
export interface Exchange {
  // written by the slow step
  wantedOpeningRatio: Real;
  failSafe: Flag;
  /** Coordinate that holds the safe pressure ratio at this engine speed: the foot of the guard's floor. */
  guardBase: Real;
  /** Full while the accelerator is not known: a lost pedal is no lifted pedal. */
  acceleratorRatio: Real;
  boostPressureKpa: Real;

  // written by the fast step
  guardFloor: Real;
  guardActive: Flag;
  /** The gate stands fully open and torque is limited, whatever the slow step wants. */
  tripped: Flag;
  targetReductionKpa: Real;
  turboSpeedReady: Flag;
  turboSpeedFailed: Flag;
}
