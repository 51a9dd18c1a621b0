// One turbo's exhaust side and rotor: manifold, turbine beside wastegate, outlet, shaft.
//   Weo kg/s all cylinders   Wt, Wwg, Wxl kg/s per turbo   J kg m2   bf N m s
// (22) to (25): turbine.ts, wastegate.ts              (26) Wxl = orifice(Axl; pem -> pa)
// (31) dpem/dt = R Tem/Ve (Weo/nt - Wt - Wwg - Wxl)
// (32) dpt/dt  = (pa + kex W |W| Tem/pa - pt)/tpt,  W = Wt + Wwg
// (33) dom/dt  = (turbine torque - compressor torque - bf om)/J
// limits: no flow gives ambient pressure at the outlet; equal torques hold the speed
// source: rotor and control volume, Eriksson 2007 (Oil & Gas Sci. Technol. 62(4))
import { GAS_CONSTANT } from "./gas.ts";
import { orificeFlow } from "./orifice.ts";
import type { PlantFlows } from "./plant-flows.ts";
import type { PlantFaults, PlantInput } from "./plant-input.ts";
import type { PlantParameters } from "./plant-parameters.ts";
import type { PlantState } from "./plant-state.ts";
import { isentropicVelocity, turbineFlow, turbineTorque } from "./turbine.ts";
import { wastegateArea } from "./wastegate.ts";

/** Sets the rates of exhaust and outlet pressure and of the turbo's speed. */
export function turbineStage(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  faults: PlantFaults,
  flows: PlantFlows,
  rates: PlantState,
): void {
  const pressure = state.exhaustPressure;
  const outlet = state.outletPressure;
  const temperature = state.exhaustTemperature;
  const speed = state.turboSpeed;
  const ambient = input.ambientPressure;
  const root = Math.sqrt(temperature);
  const ratio = outlet / pressure;
  const turbine = turbineFlow(parameters, pressure, ratio, root);
  const efficiency = parameters.turbineEfficiency * faults.turbineEfficiencyFactor;
  const velocity = isentropicVelocity(ratio, temperature);
  const torque = turbineTorque(parameters, efficiency, turbine, velocity, speed);
  const area = wastegateArea(parameters, state.wastegateOpening);
  const through = turbine + orificeFlow(area, pressure, outlet, root);
  const leak = orificeFlow(faults.exhaustLeakArea, pressure, ambient, root);
  const backPressure = (parameters.exhaustLoss * through * Math.abs(through) * temperature) / ambient;
  rates.exhaustPressure =
    ((GAS_CONSTANT * temperature) / parameters.exhaustVolume) *
    (flows.engineExhaust / parameters.turboCount - through - leak);
  rates.outletPressure = (ambient + backPressure - outlet) / parameters.outletTimeConstant;
  rates.turboSpeed =
    (torque - flows.compressorTorque - parameters.rotorFriction * speed) / parameters.rotorInertia;
}
