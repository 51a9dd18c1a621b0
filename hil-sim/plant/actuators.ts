// The three electric actuators: wastegate, throttle, bypass valve.
// (39) = (28): wastegate.ts     (41): throttle.ts     (40) dab/dt = (command - ab)/tbp
// limits: a command equal to the opening holds it
// source: first-order lag, common practice
import type { PlantFlows } from "./plant-flows.ts";
import type { PlantFaults, PlantInput } from "./plant-input.ts";
import type { PlantParameters } from "./plant-parameters.ts";
import type { PlantState } from "./plant-state.ts";
import { throttleVelocity } from "./throttle.ts";
import { wastegateVelocity } from "./wastegate.ts";

/** Sets the rates of the three openings. */
export function actuators(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  faults: PlantFaults,
  _flows: PlantFlows,
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
