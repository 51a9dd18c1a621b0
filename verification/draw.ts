import type { DrawnScenario } from "../hil-sim/index.ts";
import type { ScenarioSpec } from "../spec/index.ts";
import { type FreeValue, fixScenario, freeValues, type Reductions } from "./fix-scenario.ts";
import { type Uniform, uniformOf } from "./random.ts";

/** All that tells one run of a scenario from another: plain data, enough to make the run again. */
export interface Draw extends Reductions {
  /** One number for each of `freeValues(scenario)`, in its base unit. */
  readonly values: readonly number[];
  /** One number in [-1, 1] for each parameter of the scenario's scatter set. */
  readonly scatter: readonly number[];
  readonly noiseSeed: number;
}

/**
 * The draw of run `index`, from (seed, scenario name, index) alone; every number uniform in its range.
 * `scatterLength` is the number of parameters that the scenario's plant scatter moves.
 */
export function drawRun(scenario: ScenarioSpec, scatterLength: number, seed: number, index: number): Draw {
  const uniform = uniformOf(seed, scenario.name, index);
  return {
    noiseSeed: Math.floor(uniform() * 4294967296),
    scatter: Array.from({ length: scatterLength }, () => 2 * uniform() - 1),
    values: freeValues(scenario).map(({ free }) => free.low + (free.high - free.low) * uniform()),
    noise: 1,
    faults: scenario.faults.map(() => true),
  };
}

/**
 * A run at the ends of the ranges: every number is its least, middle or greatest value, the scatter likewise. The
 * first three have all of them at the middle, the least, the greatest; they are no sample of the distribution.
 */
export function drawCorner(scenario: ScenarioSpec, scatterLength: number, seed: number, index: number): Draw {
  const uniform = uniformOf(seed, `corner of ${scenario.name}`, index);
  const place = index < 3 ? () => [0.5, 0, 1][index] : () => end(uniform);
  return {
    noiseSeed: Math.floor(uniform() * 4294967296),
    scatter: Array.from({ length: scatterLength }, () => 2 * place() - 1),
    values: freeValues(scenario).map(({ free }) => free.low + (free.high - free.low) * place()),
    noise: 1,
    faults: scenario.faults.map(() => true),
  };
}

function end(uniform: Uniform): number {
  const third = Math.floor(3 * uniform());
  return third / 2;
}

/** The scenario that a draw stands for. */
export function scenarioOf(scenario: ScenarioSpec, draw: Draw): DrawnScenario {
  let next = 0;
  const pick = ({ free }: FreeValue) => (free.low === free.high ? free.low : draw.values[next++]);
  return fixScenario(scenario, pick, draw, draw.noiseSeed);
}
