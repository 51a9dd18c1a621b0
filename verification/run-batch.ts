import type { ControllerPort } from "../hil-sim/index.ts";
import type { LoopSpec } from "../spec/index.ts";
import type { Batch, BatchResult } from "./campaign.ts";
import { type Draw, drawCorner, drawRun } from "./draw.ts";
import { type RunDraw, requirementsOf, scenarioRunner } from "./run-scenario.ts";
import { scatterNames } from "./scatter.ts";

/** Runs batches one after another on one controller; each result depends on (seed, scenario, run index) alone. */
export function batchRunner(
  loop: LoopSpec,
  port: ControllerPort,
  seed: number,
): (batch: Batch) => BatchResult {
  const runners: (RunDraw | undefined)[] = [];
  return (batch) => {
    const scenario = loop.scenarios[batch.scenario];
    runners[batch.scenario] ??= scenarioRunner(loop, scenario, port);
    const run = runners[batch.scenario] as RunDraw;
    const columns = requirementsOf(loop, scenario).length;
    const margins = new Float64Array(batch.count * columns).fill(Number.NaN);
    let leftValidity = 0;
    let clamped = 0;
    for (let row = 0; row < batch.count; row++) {
      const judged = run(drawOf(loop, batch.scenario, batch.kind, seed, batch.from + row));
      judged.margins.forEach((margin, column) => {
        if (margin !== undefined) margins[row * columns + column] = margin;
      });
      if (judged.leftValidity) leftValidity++;
      if (judged.clamped) clamped++;
    }
    return { margins, leftValidity, clamped };
  };
}

/** The draw of one run of a campaign. */
export function drawOf(
  loop: LoopSpec,
  scenarioIndex: number,
  kind: Batch["kind"],
  seed: number,
  index: number,
): Draw {
  const scenario = loop.scenarios[scenarioIndex];
  const draw = kind === "random" ? drawRun : drawCorner;
  return draw(scenario, scatterNames(scenario.plantScatter).length, seed, index);
}
