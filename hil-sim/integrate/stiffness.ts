// Closed-form bound of the plant's fastest eigenvalue, from parameters alone.
//   throttle node  R sqrt(Tb) K f' Ath_max (1/Vb + 1/Vi)           f' steepest slope of the orifice function
//   exhaust node   R sqrt(Tem)/Ve (K f' Awg_max + Kt kt')          kt' slope of the turbine's linear zone
//   every lag      1/time constant
// with Tb 340 K and Tem 1250 K; 1.0 to 1.1 of the largest eigenvalue found over an operating grid
import { GAS_CONSTANT } from "../plant/gas.ts";
import { CHOKED_FLOW, STEEPEST_SLOPE } from "../plant/orifice.ts";
import type { PlantParameters } from "../plant/plant-parameters.ts";
import { throttleFlowArea } from "../plant/throttle.ts";
import { turbineLinearSlope } from "../plant/turbine.ts";
import { wastegateArea } from "../plant/wastegate.ts";

/** Product |lambda| h that a step may reach; Heun's limit is 2. */
const LARGEST_PRODUCT = 1.6;

/** Bound of |lambda|, 1/s. */
export function stiffnessBound(parameters: PlantParameters): number {
  const orifice = CHOKED_FLOW * STEEPEST_SLOPE;
  const throttleNode =
    GAS_CONSTANT *
    Math.sqrt(340) *
    orifice *
    throttleFlowArea(parameters, 1) *
    (1 / parameters.boostVolume + 1 / parameters.intakeVolume);
  const exhaustNode =
    ((GAS_CONSTANT * Math.sqrt(1250)) / parameters.exhaustVolume) *
    (orifice * wastegateArea(parameters, 1) + parameters.turbineFlow * turbineLinearSlope(parameters));
  const shortest = Math.min(
    parameters.flowTimeConstant,
    parameters.outletTimeConstant,
    parameters.bypassTimeConstant,
    parameters.throttleTimeConstant,
    parameters.wastegateTimeConstant,
    parameters.gasTimeConstant,
    parameters.mixingTimeConstant,
    parameters.intercoolerTimeConstant,
  );
  return Math.max(throttleNode, exhaustNode, 1 / shortest);
}

/** Steps per millisecond that keep the method stable on these parameters. */
export function substepsPerMillisecond(parameters: PlantParameters): number {
  const wanted = (stiffnessBound(parameters) * 1e-3) / LARGEST_PRODUCT;
  const whole = Math.floor(wanted);
  return whole < wanted ? whole + 1 : whole;
}
