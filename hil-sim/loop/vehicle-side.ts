import type { ControllerInput, ControllerOutput } from "../controller-port.ts";
import type { PlantInput } from "../plant/plant-input.ts";
import type { PlantState } from "../plant/plant-state.ts";

const OVERRUN_ACCELERATOR = 0.02;
/** rad/s, 1500 rpm. */
const OVERRUN_SPEED = 157.07963267948966;

/** What the rest of the vehicle makes of driver and controller: throttle, fuel, bypass and gate commands. */
export function actOnPlant(
  driver: ControllerInput,
  output: ControllerOutput,
  state: PlantState,
  input: PlantInput,
): void {
  const accelerator = driver.acceleratorRatio;
  const limit = output.torqueLimitRatio;
  input.throttleCommand = Math.min(accelerator, limit);
  input.fuel = fuelFlows(accelerator, state.engineSpeed, output.fuelCutPermitted) && limit > 0 ? 1 : 0;
  input.bypassCommand = output.bypassCommandRatio;
  input.wastegateCommand = output.wastegateCommandRatio;
}

function fuelFlows(accelerator: number, engineSpeed: number, cutPermitted: boolean): boolean {
  return !(cutPermitted && accelerator < OVERRUN_ACCELERATOR && engineSpeed > OVERRUN_SPEED);
}
