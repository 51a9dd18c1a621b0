import {
  type DrawnScenario,
  type OperatingPoint,
  openingForBoost,
  type PlantParameters,
  type ReachableBoost,
  reachableBoost,
  standardPressure,
  type Trace,
} from "../hil-sim/index.ts";
import type { Command } from "./patterns/commands.ts";
import { recorded } from "./patterns/recorded.ts";

const RADIAN_PER_RPM = 0.10471975511965977;

/**
 * Room that a plant needs beyond a target on either side, as a ratio of it: a gate at its stop within the usual
 * settling band has nothing left to settle with.
 */
const ROOM = 0.025;

/** What the plant of a run can make of a command, by the steady solver; the controller has no say in it. */
export interface Reach {
  /** Some gate opening, no end stop, holds the wanted boost. */
  readonly holds: boolean;
  /** The same for targets 2.5 % higher and lower, and the hold that the command leaves was held or asked for no boost. */
  readonly withRoom: boolean;
}

/**
 * The reach of each command of a run, on that run's plant, at the engine speed and accelerator at the end of the
 * command's window. The hold that opens a trace is asked about only where no command follows. `leastBoost`: kPa above
 * ambient below which a target asks for no boost.
 */
export function reachOfCommands(
  parameters: PlantParameters,
  scenario: DrawnScenario,
  trace: Trace,
  commands: readonly Command[],
  leastBoost: number,
): Reach[] {
  const noBoost = standardPressure(scenario.ambient.altitude) / 1000 + leastBoost;
  const holds = holdsAt(parameters, scenario, trace);
  return commands.map((command, index) => {
    if (index === 0 && commands.length > 1) return { holds: false, withRoom: false };
    const before = commands[index - 1];
    const fits = holds(command, 1);
    const startsWell = before === undefined || before.to < noBoost || holds(before, 1);
    const withRoom = fits && startsWell && holds(command, 1 - ROOM) && holds(command, 1 + ROOM);
    return { holds: fits, withRoom };
  });
}

/** Whether the plant holds a command's wanted boost times a ratio; the range of each operating point is solved once. */
function holdsAt(parameters: PlantParameters, scenario: DrawnScenario, trace: Trace) {
  const wanted = recorded(trace, "boost_wanted");
  const ranges = new Map<string, ReachableBoost>();
  return (command: Command, ratio: number): boolean => {
    const last = command.until - 1;
    const point = pointAt(scenario, trace, last);
    const boost = wanted[last] * ratio * 1000;
    const key = `${point.engineSpeed} ${point.throttle}`;
    const range = ranges.get(key) ?? reachableBoost(parameters, point);
    ranges.set(key, range);
    if (range.converged) return boost > range.lowest && boost < range.highest;
    return openingForBoost(parameters, point, boost).kind === "held";
  };
}

function pointAt(scenario: DrawnScenario, trace: Trace, sample: number): OperatingPoint {
  return {
    throttle: recorded(trace, "accelerator")[sample],
    bypass: 0,
    fuel: 1,
    engineSpeed: recorded(trace, "engine_speed")[sample] * RADIAN_PER_RPM,
    ambientPressure: standardPressure(scenario.ambient.altitude),
    ambientTemperature: scenario.ambient.temperature,
  };
}
