/** A stretch of runs of one scenario: the unit of work handed to a worker. */
export interface Batch {
  /** Index into the spec's scenarios. */
  readonly scenario: number;
  /** Random runs are drawn from the stated distribution, corner runs lie at the ends of the ranges. */
  readonly kind: "random" | "corner";
  readonly from: number;
  readonly count: number;
}

export interface BatchResult {
  /** One row per run, one column per requirement of the scenario; NaN where a run did not exercise it. */
  readonly margins: Float64Array;
  readonly leftValidity: number;
  readonly clamped: number;
}

export type RunBatch = (batch: Batch) => Promise<BatchResult>;

export interface CampaignPlan {
  /** Number of requirements that apply, for each scenario; scenarios without any are not run. */
  readonly requirements: readonly number[];
  readonly runs: number;
  readonly corners: number;
}

/** What all runs of one kind of one scenario gave. */
export interface ScenarioMargins {
  /** One array per requirement of the scenario, one margin per run in the order of runs. */
  readonly margins: readonly Float64Array[];
  readonly leftValidity: number;
  readonly clamped: number;
}

export interface CampaignResult {
  readonly random: readonly ScenarioMargins[];
  readonly corner: readonly ScenarioMargins[];
  readonly simulations: { readonly random: number; readonly corner: number };
}

export interface Progress {
  readonly done: number;
  readonly total: number;
}

/** Runs per batch: small enough to share evenly and to answer an interrupt, large enough to cost nothing. */
const BATCH_RUNS = 20;

/**
 * Runs a campaign. The result depends on the plan and on what each run gives, not on how many batches `runBatch` works
 * on at once, nor on the order in which they end.
 */
export async function runCampaign(
  plan: CampaignPlan,
  runBatch: RunBatch,
  onProgress: (progress: Progress) => void = () => {},
): Promise<CampaignResult> {
  const batches = batchesOf(plan);
  const total = batches.reduce((sum, batch) => sum + batch.count, 0);
  let done = 0;
  const results = await Promise.all(
    batches.map(async (batch) => {
      const result = await runBatch(batch);
      done += batch.count;
      onProgress({ done, total });
      return result;
    }),
  );
  const gather = (kind: Batch["kind"], runs: number) =>
    plan.requirements.map((columns, scenario) => {
      const own = batches.flatMap((batch, index) =>
        batch.scenario === scenario && batch.kind === kind ? [{ batch, result: results[index] }] : [],
      );
      return join(own, columns, columns > 0 ? runs : 0);
    });
  const scenarios = plan.requirements.filter((columns) => columns > 0).length;
  return {
    random: gather("random", plan.runs),
    corner: gather("corner", plan.corners),
    simulations: { random: scenarios * plan.runs, corner: scenarios * plan.corners },
  };
}

function batchesOf(plan: CampaignPlan): Batch[] {
  const batches: Batch[] = [];
  plan.requirements.forEach((columns, scenario) => {
    if (columns === 0) return;
    for (const [kind, runs] of [
      ["random", plan.runs],
      ["corner", plan.corners],
    ] as const) {
      for (let from = 0; from < runs; from += BATCH_RUNS) {
        batches.push({ scenario, kind, from, count: Math.min(BATCH_RUNS, runs - from) });
      }
    }
  });
  return batches;
}

function join(
  parts: readonly { readonly batch: Batch; readonly result: BatchResult }[],
  columns: number,
  runs: number,
): ScenarioMargins {
  const margins = Array.from({ length: columns }, () => new Float64Array(runs));
  for (const { batch, result } of parts) {
    for (let row = 0; row < batch.count; row++) {
      for (let column = 0; column < columns; column++) {
        margins[column][batch.from + row] = result.margins[row * columns + column];
      }
    }
  }
  return {
    margins,
    leftValidity: parts.reduce((sum, { result }) => sum + result.leftValidity, 0),
    clamped: parts.reduce((sum, { result }) => sum + result.clamped, 0),
  };
}
