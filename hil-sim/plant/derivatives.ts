// The plant's right-hand side: components joined into 14 rates.
//   nt turbos in parallel; volumes hold ideal gas at their own temperature
// (29) dpb/dt  = R Tb/Vb (nt Wc - Wbp - Wth - Wlk)     (30) dpim/dt = R Tim/Vi (Wth - We)
// (31) dpem/dt = R Tem/Ve (Weo/nt - Wt - Wwg - Wxl)
// (32) dpt/dt  = (pa + kex W |W| Tem/pa - pt)/tpt, W = Wt + Wwg
// (33) dom/dt  = (torque_t - torque_c - bf om)/J       (34) dWc/dt  = (map flow, uncorrected - Wc)/tc
// (35) dTb/dt  = (Tic - Tb)/tic    (36) dT1/dt = (T1q - T1)/t1    (37) dTem/dt = (Tg - Tem)/tem
// (38) dTw/dt  = (cpe Weo eps_w (Teo - Tw) - hx (Tw - Ta))/Cw
// (39) wastegate, (41) throttle: their files           (40) dab/dt = (ubp - ab)/tbp
// (42) dwe/dt  = veh (Te - tl0 - tl2 we^2)/Jv + (1 - veh) awe
// source: control volumes and rotor, Eriksson 2007 (Oil & Gas Sci. Technol. 62(4))
import { inletPressure, mixedInletTemperature } from "./air-filter.ts";
import { mapFlow, usableHead, workVelocity } from "./compressor.ts";
import { engineAirFlow, engineTorque, portTemperature } from "./engine.ts";
import { GAS_CONSTANT, HEAT_CAPACITY_AIR, HEAT_CAPACITY_EXHAUST } from "./gas.ts";
import { compressorOutletPressure, cooledTemperature } from "./intercooler.ts";
import { orificeFlow } from "./orifice.ts";
import type { PlantFlows } from "./plant-flows.ts";
import type { PlantFaults, PlantInput } from "./plant-input.ts";
import type { PlantParameters } from "./plant-parameters.ts";
import type { PlantState } from "./plant-state.ts";
import { throttleFlowArea, throttleVelocity } from "./throttle.ts";
import { isentropicVelocity, turbineFlow, turbineTorque } from "./turbine.ts";
import { wastegateArea, wastegateVelocity } from "./wastegate.ts";

/** Rates of all states, per second, into `rates`; what happens inside goes to `flows`. */
export function derivatives(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  faults: PlantFaults,
  flows: PlantFlows,
  rates: PlantState,
): void {
  boostSide(parameters, state, input, faults, flows);
  compressorSide(parameters, state, input, faults, flows);
  engineSide(parameters, state, input, flows);
  exhaustSide(parameters, state, input, faults, flows);
  pressureRates(parameters, state, input, flows, rates);
  rotorAndTemperatureRates(parameters, state, input, flows, rates);
  actuatorRates(parameters, state, input, faults, rates);
  const load =
    parameters.vehicleLoadBase + parameters.vehicleLoadQuadratic * state.engineSpeed * state.engineSpeed;
  rates.engineSpeed =
    (input.freeVehicle * (flows.engineTorque - load)) / parameters.vehicleInertia +
    (1 - input.freeVehicle) * input.engineAcceleration;
}

/** (2), (3), (4): what leaves the boost volume. */
function boostSide(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  faults: PlantFaults,
  flows: PlantFlows,
): void {
  const root = Math.sqrt(state.boostTemperature);
  const boost = state.boostPressure;
  const ambient = input.ambientPressure;
  flows.bypass = orificeFlow(parameters.bypassArea * state.bypassOpening, boost, ambient, root);
  flows.throttle = orificeFlow(
    throttleFlowArea(parameters, state.throttleOpening),
    boost,
    state.intakePressure,
    root,
  );
  flows.boostLeak = orificeFlow(faults.boostLeakArea, boost, ambient, root);
}

/** (5) to (16): one turbo's air side. */
function compressorSide(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  faults: PlantFaults,
  flows: PlantFlows,
): void {
  const flow = state.compressorFlow;
  const bypassFlow = flows.bypass / parameters.turboCount;
  const filterFlow = flow - bypassFlow;
  const loss = parameters.airFilterLoss * faults.airFilterFactor;
  const pressure = inletPressure(loss, filterFlow, input.ambientPressure, input.ambientTemperature);
  const rootTheta = Math.sqrt(state.inletTemperature / parameters.mapTemperature);
  const pressureCorrection = pressure / parameters.mapPressure;
  const correctedFlow = (flow * rootTheta) / pressureCorrection;
  const scale = parameters.referenceTipSpeed * rootTheta;
  const tipSpeed = parameters.compressorRadius * state.turboSpeed;
  const speedRatio = tipSpeed / scale;
  const head = usableHead(parameters, tipSpeed, speedRatio, state.inletTemperature);
  const outlet = compressorOutletPressure(parameters, flow, state.boostPressure, state.boostTemperature);
  const target = mapFlow(parameters, head, speedRatio, outlet / pressure, correctedFlow);
  flows.compressorTarget = (target * pressureCorrection) / rootTheta;
  const velocity = workVelocity(parameters, tipSpeed, correctedFlow, scale);
  flows.compressorTorque = Math.abs(flow) * parameters.compressorRadius * velocity;
  const work = tipSpeed * velocity;
  const outletTemperature = state.inletTemperature + Math.max(work, 0) / HEAT_CAPACITY_AIR;
  flows.cooledTemperature = cooledTemperature(parameters, flow, outletTemperature, input.ambientTemperature);
  flows.mixedInletTemperature = mixedInletTemperature(
    parameters,
    filterFlow,
    bypassFlow,
    input.ambientTemperature,
    state.boostTemperature,
  );
}

/** (17) to (21). */
function engineSide(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  flows: PlantFlows,
): void {
  const temperature = state.boostTemperature + parameters.intakeHeating;
  const air = engineAirFlow(
    parameters,
    state.engineSpeed,
    state.intakePressure,
    state.exhaustPressure,
    temperature,
  );
  const fuelFlow = (input.fuel * air) / (parameters.stoichiometricRatio * parameters.lambda);
  const out = air + fuelFlow;
  const port = portTemperature(parameters, input.fuel, air, temperature);
  const share = parameters.wallFlow / (out + parameters.wallFlow);
  const toWall = share * (port - state.wallTemperature);
  flows.engineAir = air;
  flows.engineExhaust = out;
  flows.portTemperature = port;
  flows.gasTemperature = port - toWall;
  flows.wallHeat = HEAT_CAPACITY_EXHAUST * out * toWall;
  flows.engineTorque = engineTorque(
    parameters,
    state.engineSpeed,
    fuelFlow,
    state.intakePressure,
    state.exhaustPressure,
  );
}

/** (22) to (26): one turbo's exhaust side. */
function exhaustSide(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  faults: PlantFaults,
  flows: PlantFlows,
): void {
  const pressure = state.exhaustPressure;
  const temperature = state.exhaustTemperature;
  const root = Math.sqrt(temperature);
  const ratio = state.outletPressure / pressure;
  flows.turbine = turbineFlow(parameters, pressure, ratio, root);
  flows.turbineTorque = turbineTorque(
    parameters,
    parameters.turbineEfficiency * faults.turbineEfficiencyFactor,
    flows.turbine,
    isentropicVelocity(ratio, temperature),
    state.turboSpeed,
  );
  const area = wastegateArea(parameters, state.wastegateOpening);
  flows.wastegate = orificeFlow(area, pressure, state.outletPressure, root);
  flows.exhaustLeak = orificeFlow(faults.exhaustLeakArea, pressure, input.ambientPressure, root);
}

/** (29) to (32). */
function pressureRates(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  flows: PlantFlows,
  rates: PlantState,
): void {
  const ambient = input.ambientPressure;
  const intakeTemperature = state.boostTemperature + parameters.intakeHeating;
  const throughTurbine = flows.turbine + flows.wastegate;
  const backPressure =
    (parameters.exhaustLoss * throughTurbine * Math.abs(throughTurbine) * state.exhaustTemperature) / ambient;
  rates.boostPressure =
    ((GAS_CONSTANT * state.boostTemperature) / parameters.boostVolume) *
    (parameters.turboCount * state.compressorFlow - flows.bypass - flows.throttle - flows.boostLeak);
  rates.intakePressure =
    ((GAS_CONSTANT * intakeTemperature) / parameters.intakeVolume) * (flows.throttle - flows.engineAir);
  rates.exhaustPressure =
    ((GAS_CONSTANT * state.exhaustTemperature) / parameters.exhaustVolume) *
    (flows.engineExhaust / parameters.turboCount - throughTurbine - flows.exhaustLeak);
  rates.outletPressure = (ambient + backPressure - state.outletPressure) / parameters.outletTimeConstant;
}

/** (33) to (38). */
function rotorAndTemperatureRates(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  flows: PlantFlows,
  rates: PlantState,
): void {
  const friction = parameters.rotorFriction * state.turboSpeed;
  const wallLoss = parameters.wallLoss * (state.wallTemperature - input.ambientTemperature);
  rates.turboSpeed = (flows.turbineTorque - flows.compressorTorque - friction) / parameters.rotorInertia;
  rates.compressorFlow = (flows.compressorTarget - state.compressorFlow) / parameters.flowTimeConstant;
  rates.boostTemperature =
    (flows.cooledTemperature - state.boostTemperature) / parameters.intercoolerTimeConstant;
  rates.inletTemperature =
    (flows.mixedInletTemperature - state.inletTemperature) / parameters.mixingTimeConstant;
  rates.exhaustTemperature = (flows.gasTemperature - state.exhaustTemperature) / parameters.gasTimeConstant;
  rates.wallTemperature = (flows.wallHeat - wallLoss) / parameters.wallHeatCapacity;
}

/** (39) to (41). */
function actuatorRates(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  faults: PlantFaults,
  rates: PlantState,
): void {
  const load = (state.exhaustPressure - state.outletPressure) / parameters.stallPressure;
  rates.wastegateOpening = wastegateVelocity(
    parameters,
    faults.wastegateHealth,
    load,
    input.wastegateCommand,
    state.wastegateOpening,
  );
  rates.bypassOpening = (input.bypassCommand - state.bypassOpening) / parameters.bypassTimeConstant;
  rates.throttleOpening = throttleVelocity(parameters, input.throttleCommand, state.throttleOpening);
}
