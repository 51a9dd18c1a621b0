// Throttle: area over opening, and its servo (first order, limited rate).
//   al 0..1 opening   A m2
// (3)  A = Ath0 + Ath1 al^2, close to a 1 - cos law
// (41) dal/dt = clip((command - al)/t, -rate, rate)
// limits: closed leaves the leak area; a large step moves at the rate
// source: area law after Eriksson & Nielsen 2014 (from memory)
import type { PlantParameters } from "./plant-parameters.ts";

/** Effective area m2. */
export function throttleFlowArea(parameters: PlantParameters, opening: number): number {
  return parameters.throttleLeakArea + parameters.throttleArea * opening * opening;
}

/** Opening rate 1/s. */
export function throttleVelocity(parameters: PlantParameters, command: number, opening: number): number {
  const wanted = (command - opening) / parameters.throttleTimeConstant;
  const rate = parameters.throttleRate;
  return wanted < -rate ? -rate : Math.min(wanted, rate);
}
