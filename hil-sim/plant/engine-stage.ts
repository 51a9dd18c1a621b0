// Intake volume, engine, exhaust wall, vehicle.
//   Tim K intake gas   We, Wfuel, Weo kg/s   Teo, Tg K at the port and behind the wall   Cw J/K   Jv kg m2 at the crank
// (17) to (21): engine.ts
// (30) dpim/dt = R Tim/Vi (Wth - We)          (37) dTem/dt = (Tg - Tem)/tem,  Tg = Teo - eps_w (Teo - Tw)
// (38) dTw/dt  = (cpe Weo eps_w (Teo - Tw) - hx (Tw - Ta))/Cw
// (42) dwe/dt  = veh (Te - tl0 - tl2 we^2)/Jv + (1 - veh) awe
// limits: an imposed speed ignores the torque; no exhaust flow leaves the gas at wall temperature
// source: control volume, Eriksson 2007 (Oil & Gas Sci. Technol. 62(4))
import { engineAirFlow, engineTorque, portTemperature } from "./engine.ts";
import { GAS_CONSTANT, HEAT_CAPACITY_EXHAUST } from "./gas.ts";
import type { PlantFlows } from "./plant-flows.ts";
import type { PlantFaults, PlantInput } from "./plant-input.ts";
import type { PlantParameters } from "./plant-parameters.ts";
import type { PlantState } from "./plant-state.ts";

/** Sets exhaust flow and torque, and the rates of intake pressure, exhaust temperatures and engine speed. */
export function engineStage(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  _faults: PlantFaults,
  flows: PlantFlows,
  rates: PlantState,
): void {
  const speed = state.engineSpeed;
  const intake = state.intakePressure;
  const exhaust = state.exhaustPressure;
  const temperature = state.boostTemperature + parameters.intakeHeating;
  const air = engineAirFlow(parameters, speed, intake, exhaust, temperature);
  const fuelFlow = (input.fuel * air) / (parameters.stoichiometricRatio * parameters.lambda);
  const out = air + fuelFlow;
  const port = portTemperature(parameters, input.fuel, air, temperature);
  const share = parameters.wallFlow / (out + parameters.wallFlow);
  const cooling = share * (port - state.wallTemperature);
  const wallLoss = parameters.wallLoss * (state.wallTemperature - input.ambientTemperature);
  const torque = engineTorque(parameters, speed, fuelFlow, intake, exhaust);
  const load = parameters.vehicleLoadBase + parameters.vehicleLoadQuadratic * speed * speed;
  flows.engineExhaust = out;
  flows.engineTorque = torque;
  rates.intakePressure = ((GAS_CONSTANT * temperature) / parameters.intakeVolume) * (flows.throttle - air);
  rates.exhaustTemperature = (port - cooling - state.exhaustTemperature) / parameters.gasTimeConstant;
  rates.wallTemperature = (HEAT_CAPACITY_EXHAUST * out * cooling - wallLoss) / parameters.wallHeatCapacity;
  rates.engineSpeed =
    (input.freeVehicle * (torque - load)) / parameters.vehicleInertia +
    (1 - input.freeVehicle) * input.engineAcceleration;
}
