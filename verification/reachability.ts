import {
  type DrawnScenario,
  openingForBoost,
  type PlantParameters,
  standardPressure,
  type Trace,
} from "../hil-sim/index.ts";
import type { Command } from "./patterns/commands.ts";
import { recorded } from "./patterns/recorded.ts";

const RADIAN_PER_RPM = 0.10471975511965977;

/**
 * Whether the plant of a run can hold what a command asks for, by the steady solver on that plant: at the engine speed
 * and accelerator at the end of the command's window there is a gate opening, no end stop, at which the wanted boost
 * stays. Closed and below: out of reach; open and above: saturated. The controller has no say in it.
 */
export function canHold(
  parameters: PlantParameters,
  scenario: DrawnScenario,
  trace: Trace,
  command: Command,
): boolean {
  const last = command.until - 1;
  const point = {
    throttle: recorded(trace, "accelerator")[last],
    bypass: 0,
    fuel: 1,
    engineSpeed: recorded(trace, "engine_speed")[last] * RADIAN_PER_RPM,
    ambientPressure: standardPressure(scenario.ambient.altitude),
    ambientTemperature: scenario.ambient.temperature,
  };
  const wanted = recorded(trace, "boost_wanted")[last] * 1000;
  return openingForBoost(parameters, point, wanted).kind === "held";
}
