import { courseValue } from "../course.ts";
import type { DrawnScenario } from "../drawn-scenario.ts";
import { standardPressure } from "../exact-math.ts";
import type { PlantParameters } from "../plant/plant-parameters.ts";
import type { PlantState } from "../plant/plant-state.ts";
import { equilibriumAt } from "../steady/equilibrium.ts";
import { openingForBoost } from "../steady/opening-for-boost.ts";
import type { OperatingPoint } from "../steady/operating-point.ts";

const RADIAN_PER_RPM = 0.10471975511965977;

/** The operating point of a scenario's first instant. */
export function startPoint(scenario: DrawnScenario): OperatingPoint {
  return {
    throttle: courseValue(scenario.accelerator, 0),
    bypass: 0,
    fuel: 1,
    engineSpeed: startSpeedRpm(scenario) * RADIAN_PER_RPM,
    ambientPressure: standardPressure(scenario.ambient.altitude),
    ambientTemperature: scenario.ambient.temperature,
  };
}

function startSpeedRpm(scenario: DrawnScenario): number {
  const { engineSpeed } = scenario;
  return engineSpeed.kind === "vehicle" ? engineSpeed.fromRpm : courseValue(engineSpeed.course, 0);
}

/**
 * The plant's equilibrium at a scenario's first values: holding the first wanted boost (the target course's, else
 * `startBoostKpa`) or as near to it as the gate gets, else with the gate at `restOpening`.
 */
export function startOfRun(
  parameters: PlantParameters,
  scenario: DrawnScenario,
  restOpening: number,
): PlantState {
  const point = startPoint(scenario);
  const target = scenario.target;
  const boostKpa = target === undefined ? scenario.startBoostKpa : courseValue(target, 0);
  if (boostKpa === undefined) return equilibriumAt(parameters, point, restOpening).state;
  return openingForBoost(parameters, point, boostKpa * 1000).state;
}
