// Turbine, one turbo: Stodola's ellipse for flow, torque linear in speed.
//   PR = pt/pem   Tem K   Cs m/s isentropic velocity   rw m tip radius   om rad/s   beta best blade-speed ratio
// (22) Wt = Kt pem/sqrt(Tem) sqrt(1 - PR^2), linear above PR = rtl, factor >= -0.5
// (23) Cs = sqrt(2 cpe Tem (1 - min(PR, 1)^(1/4)))
// (24) torque = max(Wt, 0) eta_m (rw/beta)(Cs - (rw/beta) om/2),
//      that is efficiency eta_m (2 B/beta - B^2/beta^2) with B = rw om/Cs
// limits: PR = 1 gives neither flow nor torque; torque is negative (windage) above B = 2 beta
// source: Stodola 1927 (from memory); parabola of efficiency over B, Guzzella & Onder 2010 (from memory)
import { HEAT_CAPACITY_EXHAUST } from "./gas.ts";
import type { PlantParameters } from "./plant-parameters.ts";

/** Slope of the linear zone of (22): bounds the plant's fastest eigenvalue. */
export function turbineLinearSlope(parameters: PlantParameters): number {
  const from = parameters.turbineLinearAbove;
  return Math.sqrt(1 - from * from) / (1 - from);
}

/** Flow kg/s; `ratio` is outlet over exhaust pressure. */
export function turbineFlow(
  parameters: PlantParameters,
  exhaustPressure: number,
  ratio: number,
  rootTemperature: number,
): number {
  const from = parameters.turbineLinearAbove;
  const shape =
    ratio < from
      ? Math.sqrt(1 - ratio * ratio)
      : Math.max((Math.sqrt(1 - from * from) / (1 - from)) * (1 - ratio), -0.5);
  return (parameters.turbineFlow * exhaustPressure * shape) / rootTemperature;
}

/** Isentropic velocity m/s; an expansion ratio above 1 counts as 1. */
export function isentropicVelocity(ratio: number, temperature: number): number {
  const fourthRoot = ratio < 1 ? Math.sqrt(Math.sqrt(ratio)) : 1;
  return Math.sqrt(2 * HEAT_CAPACITY_EXHAUST * temperature * (1 - fourthRoot));
}

/** Torque N·m on the rotor. */
export function turbineTorque(
  parameters: PlantParameters,
  efficiency: number,
  flow: number,
  velocity: number,
  turboSpeed: number,
): number {
  if (flow <= 0) return 0;
  const lever = parameters.turbineRadius / parameters.bestSpeedRatio;
  return flow * efficiency * lever * (velocity - 0.5 * lever * turboSpeed);
}
