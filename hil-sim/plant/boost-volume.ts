// Boost volume: filled by the compressors, emptied through throttle, bypass and a leak.
//   nt turbos   Wc kg/s per turbo   Wbp, Wth, Wlk kg/s   Vb m3   Tb K
// (2) Wbp = orifice(Abp ab; pb -> pa)    (3) Wth = orifice(throttle area; pb -> pim)    (4) Wlk = orifice(Alk; pb -> pa)
// (29) dpb/dt = R Tb/Vb (nt Wc - Wbp - Wth - Wlk)
// limits: equal flows hold the pressure; Vb -> infinity gives dpb/dt -> 0
// source: control volume, Eriksson 2007 (Oil & Gas Sci. Technol. 62(4)); Tb is its own state, so no enthalpy term
import { GAS_CONSTANT } from "./gas.ts";
import { orificeFlow } from "./orifice.ts";
import type { PlantFlows } from "./plant-flows.ts";
import type { PlantFaults, PlantInput } from "./plant-input.ts";
import type { PlantParameters } from "./plant-parameters.ts";
import type { PlantState } from "./plant-state.ts";
import { throttleFlowArea } from "./throttle.ts";

/** Sets the flows out of the boost volume and its pressure rate. */
export function boostVolume(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  faults: PlantFaults,
  flows: PlantFlows,
  rates: PlantState,
): void {
  const root = Math.sqrt(state.boostTemperature);
  const boost = state.boostPressure;
  const throttleArea = throttleFlowArea(parameters, state.throttleOpening);
  const throttle = orificeFlow(throttleArea, boost, state.intakePressure, root);
  const bypassArea = parameters.bypassArea * state.bypassOpening;
  const bypass = orificeFlow(bypassArea, boost, input.ambientPressure, root);
  const leak = orificeFlow(faults.boostLeakArea, boost, input.ambientPressure, root);
  const inflow = parameters.turboCount * state.compressorFlow;
  rates.boostPressure =
    ((GAS_CONSTANT * state.boostTemperature) / parameters.boostVolume) * (inflow - bypass - throttle - leak);
  flows.throttle = throttle;
  flows.bypass = bypass;
}
