// Wastegate: effective area over opening, and the electric actuator (motor line, servo lag, friction dead zone).
//   x 0..1 opening   A m2   load = (pem - pt)/dps  share of the stall pressure   e = command - x
// (25) A = Aw0 + Aw1 kx x/sqrt(1 + (kx x)^2): curtain and port in series
// (27) v = clip(e beyond the dead zone / tw, vw (load - 1), vw min(1 + load, 1.5))
// (28) dx/dt = health v, end stops at 0 and 1
// limits: load > 1 blows the valve open; |e| <= dead zone holds it; load = 0 gives the free rate both ways
// source: actuator with load and friction after Thomasson 2009; the reduction (27) is our own
import type { PlantParameters } from "./plant-parameters.ts";

/** Effective area m2. */
export function wastegateArea(parameters: PlantParameters, opening: number): number {
  const curtain = parameters.curtainFactor * opening;
  return (
    parameters.wastegateLeakArea + (parameters.wastegatePortArea * curtain) / Math.sqrt(1 + curtain * curtain)
  );
}

/** Opening rate 1/s; `load` is the pressure difference over the stall pressure. */
export function wastegateVelocity(
  parameters: PlantParameters,
  health: number,
  load: number,
  command: number,
  opening: number,
): number {
  const error = command - opening;
  const dead = parameters.wastegateDeadZone;
  const beyond = error > dead ? error - dead : error < -dead ? error + dead : 0;
  const slowest = parameters.wastegateRate * (load - 1);
  const fastest = parameters.wastegateRate * Math.min(1 + load, 1.5);
  let velocity = beyond / parameters.wastegateTimeConstant;
  if (velocity < slowest) velocity = slowest;
  if (velocity > fastest) velocity = fastest;
  if (opening <= 0 && velocity < 0) return 0;
  if (opening >= 1 && velocity > 0) return 0;
  return health * velocity;
}
