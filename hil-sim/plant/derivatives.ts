import { actuators } from "./actuators.ts";
import { boostVolume } from "./boost-volume.ts";
import { compressorStage } from "./compressor-stage.ts";
import { engineStage } from "./engine-stage.ts";
import type { PlantFlows } from "./plant-flows.ts";
import type { PlantFaults, PlantInput } from "./plant-input.ts";
import type { PlantParameters } from "./plant-parameters.ts";
import type { PlantState } from "./plant-state.ts";
import { turbineStage } from "./turbine-stage.ts";

/**
 * The plant, stage by stage in the order of the gas; a stage may use what earlier ones left in `flows`.
 * Called through this list each stage is compiled on its own with its components inlined; calling them by name
 * lets the compiler inline the stages and leave the components out, which costs half the speed.
 */
const STAGES = [boostVolume, compressorStage, engineStage, turbineStage, actuators];

/** Right-hand side: rates of all states per second into `rates`; results on the way into `flows`. */
export function derivatives(
  parameters: PlantParameters,
  state: PlantState,
  input: PlantInput,
  faults: PlantFaults,
  flows: PlantFlows,
  rates: PlantState,
): void {
  for (let i = 0; i < STAGES.length; i++) STAGES[i](parameters, state, input, faults, flows, rates);
}
