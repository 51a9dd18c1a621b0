import {
  applyScatter,
  copyPlantParameters,
  type PlantParameters,
  SCATTER_SETS,
  type ScatterSet,
  uniformScatter,
} from "../hil-sim/index.ts";
import type { ScenarioSpec } from "../spec/index.ts";

/** What a scenario's plant scatter moves, in the order of a draw's shares. */
function scatterSet(scatter: ScenarioSpec["plantScatter"]): ScatterSet {
  if (scatter.kind === "none") return [];
  if (scatter.kind === "uniform") return uniformScatter(scatter.ratio);
  const sets: Readonly<Record<string, ScatterSet>> = SCATTER_SETS;
  const set = Object.hasOwn(sets, scatter.name) ? sets[scatter.name] : undefined;
  if (set === undefined) throw new Error(`no scatter set is called \`${scatter.name}\``);
  return set;
}

export function scatterNames(scatter: ScenarioSpec["plantScatter"]): string[] {
  return scatterSet(scatter).map(({ name }) => name);
}

/** The plant of one run; `shares` in [-1, 1], one for each of `scatterNames`. */
export function scatteredParameters(
  nominal: PlantParameters,
  scatter: ScenarioSpec["plantScatter"],
  shares: readonly number[],
): PlantParameters {
  const set = scatterSet(scatter);
  return set.length === 0 ? copyPlantParameters(nominal) : applyScatter(nominal, set, shares);
}
