import { copyPlantParameters, type ParameterName, type PlantParameters } from "./plant/plant-parameters.ts";

/** One scattered quantity: its parameters are all multiplied by 1 + draw · halfWidth, draw uniform in [-1, 1]. */
export interface ScatterEntry {
  readonly name: string;
  readonly parameters: readonly ParameterName[];
  readonly halfWidth: number;
}
export type ScatterSet = readonly ScatterEntry[];

const one = (name: ParameterName, halfWidth: number): ScatterEntry => ({
  name,
  parameters: [name],
  halfWidth,
});

/** Named sets. `default`: production scatter of turbo, volumes, actuators and losses; half-widths are common practice, no source. */
export const SCATTER_SETS = {
  default: [
    one("turbineFlow", 0.1),
    one("turbineEfficiency", 0.1),
    one("rotorInertia", 0.1),
    one("boostVolume", 0.1),
    one("intakeVolume", 0.1),
    one("exhaustVolume", 0.1),
    one("wastegatePortArea", 0.1),
    one("curtainFactor", 0.1),
    one("wastegateTimeConstant", 0.1),
    one("wastegateRate", 0.1),
    one("airFilterLoss", 0.1),
    one("intercoolerLoss", 0.1),
    one("exhaustLoss", 0.1),
    one("wallFlow", 0.1),
    one("exhaustTemperatureFlow", 0.1),
    one("throttleArea", 0.1),
    one("stallPressure", 0.1),
    one("exhaustTemperatureBase", 0.05),
    {
      name: "volumetricEfficiency",
      parameters: ["volumetricEfficiencyBase", "volumetricEfficiencyLinear", "volumetricEfficiencyQuadratic"],
      halfWidth: 0.05,
    },
    one("lambda", 0.05),
    one("intercoolerEffectiveness", 0.06),
    one("peakHead", 0.03),
    one("workSlip", 0.03),
  ],
} as const satisfies Record<string, ScatterSet>;

/** The quantities of the default set, each within ± `ratio`. */
export function uniformScatter(ratio: number): ScatterSet {
  return SCATTER_SETS.default.map((entry) => ({ ...entry, halfWidth: ratio }));
}

/** A scattered copy; `draws` in [-1, 1], one per entry of the set. Throws if there are too few. */
export function applyScatter(
  nominal: PlantParameters,
  set: ScatterSet,
  draws: readonly number[],
): PlantParameters {
  if (draws.length < set.length) throw new Error(`${set.length} draws are needed, got ${draws.length}`);
  const parameters = copyPlantParameters(nominal);
  for (const [i, entry] of set.entries()) {
    for (const name of entry.parameters) parameters[name] *= 1 + entry.halfWidth * draws[i];
  }
  return parameters;
}
