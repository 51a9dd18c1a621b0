// One turbo's air side: filter, compressor, intercooler, in the order of the flow.
// (5) to (16): see the components
// (34) dWc/dt = (map flow, uncorrected - Wc)/tc    the duct's momentum as a relaxation towards the static map
// (35) dTb/dt = (Tic - Tb)/tic                     (36) dT1/dt = (T1q - T1)/t1
// limits: tc -> 0 puts the flow on the static map
// source: corrected quantities, definition; the relaxation (34) is our own: bounded stiffness, keeps the surge cycle
import { inletPressure, mixedInletTemperature } from "./air-filter.ts";
import { mapFlow, usableHead, workVelocity } from "./compressor.ts";
import { HEAT_CAPACITY_AIR } from "./gas.ts";
import { compressorOutletPressure, cooledTemperature } from "./intercooler.ts";
import type { PlantFlows } from "./plant-flows.ts";
import type { PlantFaults, PlantInput } from "./plant-input.ts";
import type { PlantParameters } from "./plant-parameters.ts";
import type { PlantState } from "./plant-state.ts";

/** Sets the compressor's torque and the rates of its flow and of the temperatures around it. */
export function compressorStage(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  faults: PlantFaults,
  flows: PlantFlows,
  rates: PlantState,
): void {
  const flow = state.compressorFlow;
  const inletTemperature = state.inletTemperature;
  const ambientTemperature = input.ambientTemperature;
  const bypassFlow = flows.bypass / parameters.turboCount;
  const filterFlow = flow - bypassFlow;
  const loss = parameters.airFilterLoss * faults.airFilterFactor;
  const pressure = inletPressure(loss, filterFlow, input.ambientPressure, ambientTemperature);
  const rootTheta = Math.sqrt(inletTemperature / parameters.mapTemperature);
  const correction = pressure / parameters.mapPressure / rootTheta;
  const correctedFlow = flow / correction;
  const scale = parameters.referenceTipSpeed * rootTheta;
  const tipSpeed = parameters.compressorRadius * state.turboSpeed;
  const speedRatio = tipSpeed / scale;
  const head = usableHead(parameters, tipSpeed, speedRatio, inletTemperature);
  const outlet = compressorOutletPressure(parameters, flow, state.boostPressure, state.boostTemperature);
  const target = mapFlow(parameters, head, speedRatio, outlet / pressure, correctedFlow);
  const velocity = workVelocity(parameters, tipSpeed, correctedFlow, scale);
  const outletTemperature = inletTemperature + Math.max(tipSpeed * velocity, 0) / HEAT_CAPACITY_AIR;
  const cooled = cooledTemperature(parameters, flow, outletTemperature, ambientTemperature);
  const mixed = mixedInletTemperature(
    parameters,
    filterFlow,
    bypassFlow,
    ambientTemperature,
    state.boostTemperature,
  );
  flows.compressorTorque = Math.abs(flow) * parameters.compressorRadius * velocity;
  rates.compressorFlow = (target * correction - flow) / parameters.flowTimeConstant;
  rates.boostTemperature = (cooled - state.boostTemperature) / parameters.intercoolerTimeConstant;
  rates.inletTemperature = (mixed - inletTemperature) / parameters.mixingTimeConstant;
}
