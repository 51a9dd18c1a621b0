import { copyPlantParameters, type ParameterName, type PlantParameters } from "../hil-sim/index.ts";
import type { ScenarioSpec } from "../spec/scenario-spec.ts";

const SETS: Record<string, [ParameterName, number][]> = {
  default: [
    ["turbineFlow", 0.1],
    ["turbineEfficiency", 0.1],
    ["rotorInertia", 0.1],
    ["boostVolume", 0.1],
    ["intakeVolume", 0.1],
    ["exhaustVolume", 0.1],
    ["wastegatePortArea", 0.1],
    ["curtainFactor", 0.1],
    ["wastegateTimeConstant", 0.1],
    ["wastegateRate", 0.1],
    ["airFilterLoss", 0.1],
    ["intercoolerLoss", 0.1],
    ["exhaustLoss", 0.1],
    ["wallFlow", 0.1],
    ["exhaustTemperatureFlow", 0.1],
    ["throttleArea", 0.1],
    ["stallPressure", 0.1],
    ["exhaustTemperatureBase", 0.05],
    ["volumetricEfficiencyBase", 0.05],
    ["lambda", 0.05],
    ["intercoolerEffectiveness", 0.06],
    ["peakHead", 0.03],
    ["workSlip", 0.03],
  ],
};

export function scatterNames(scatter: ScenarioSpec["plantScatter"]): string[] {
  return scatter.kind === "set" ? SETS[scatter.name].map(([name]) => name) : [];
}

export function scatteredParameters(
  nominal: PlantParameters,
  scatter: ScenarioSpec["plantScatter"],
  draws: readonly number[],
): PlantParameters {
  const parameters = copyPlantParameters(nominal);
  if (scatter.kind !== "set") return parameters;
  SETS[scatter.name].forEach(([name, ratio], index) => {
    parameters[name] *= 1 + ratio * draws[index];
  });
  return parameters;
}
