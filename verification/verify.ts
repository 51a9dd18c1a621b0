import { type ControllerPort, plantParameters } from "../hil-sim/index.ts";
import type { LoopSpec } from "../spec/index.ts";
import { controllerFacts, requirementResults, scenarioFacts } from "./build-evidence.ts";
import { type Progress, type RunBatch, runCampaign } from "./campaign.ts";
import { compressorMap } from "./compressor-map.ts";
import { counterexampleName, writeCounterexample } from "./counterexample/write-counterexample.ts";
import type { CodeFigures, ControllerFacts, Evidence, RequirementResult } from "./evidence.ts";
import { loopHashes } from "./loop-hashes.ts";
import { drawOf } from "./run-batch.ts";
import { requirementsOf, scenarioRunner } from "./run-scenario.ts";
import { shrink } from "./shrink/shrink.ts";
import { ASSUMPTIONS, CAUTIONS } from "./verify-words.ts";
import { worstTraces } from "./worst-traces.ts";

export interface VerifyOptions {
  readonly toolVersion: string;
  readonly seed: number;
  /** Random runs per scenario. */
  readonly runs: number;
  /** Runs at the ends of the ranges, per scenario. */
  readonly corners: number;
  /** Most simulations spent on making one violation small. */
  readonly shrinkBudget: number;
  readonly form: ControllerFacts["form"];
  /** The spec as read, where only some of its tests are run: the hashes are of the whole. */
  readonly whole?: LoopSpec;
  readonly codeFigures?: CodeFigures;
  readonly onProgress?: (progress: Progress) => void;
}

export interface Verified {
  readonly evidence: Evidence;
  /** Counterexample files to write beside the evidence. */
  readonly counterexamples: readonly { readonly name: string; readonly text: string }[];
}

/**
 * The whole campaign of a checked spec: random and corner runs through `runBatch`, then, on `port`, the worst runs'
 * traces and the shrinking of each violation. The result depends on spec, seed, counts and version alone.
 * @throws when the spec has no plant.
 */
export async function verifyLoop(
  loop: LoopSpec,
  runBatch: RunBatch,
  port: ControllerPort,
  options: VerifyOptions,
): Promise<Verified> {
  const { plant } = loop;
  if (plant === undefined) throw new Error("a spec without a plant cannot be verified");
  const { runs, corners, seed } = options;
  const counts = loop.scenarios.map((scenario) => requirementsOf(loop, scenario).length);
  const campaign = await runCampaign({ requirements: counts, runs, corners }, runBatch, options.onProgress);
  const found = requirementResults(loop, campaign, seed);
  const shrunk = shrinkAll(loop, port, found, options);
  const { traces, results } = worstTraces(loop, port, seed, shrunk.results);
  const evidence: Evidence = {
    format: 1,
    tool: { name: "spoolwright", version: options.toolVersion },
    seed,
    runsPerScenario: runs,
    simulations: campaign.simulations.random,
    extraSimulations: { corner: campaign.simulations.corner, shrink: shrunk.simulations },
    controller: controllerFacts(loop, options.form),
    plant: {
      name: plant.name,
      description: plant.description,
      ...(loop.plantFile !== undefined && { file: loop.plantFile }),
    },
    hashes: loopHashes(options.whole ?? loop),
    scenarios: loop.scenarios.map((scenario, i) => scenarioFacts(scenario, campaign.random[i], runs)),
    requirements: results,
    traces,
    compressorMap: compressorMap(plantParameters(plant)),
    ...(options.codeFigures && { codeFigures: options.codeFigures }),
    assumptions: ASSUMPTIONS,
    cautions: CAUTIONS,
  };
  return { evidence, counterexamples: shrunk.counterexamples };
}

interface ShrunkAll {
  readonly results: RequirementResult[];
  readonly counterexamples: { readonly name: string; readonly text: string }[];
  readonly simulations: number;
}

/** Makes the worst run of every violated requirement small, and names its counterexample in the result. */
function shrinkAll(
  loop: LoopSpec,
  port: ControllerPort,
  results: readonly RequirementResult[],
  options: VerifyOptions,
): ShrunkAll {
  const counterexamples: { name: string; text: string }[] = [];
  let simulations = 0;
  const named = results.map((result) => {
    if (result.verdict !== "violated") return result;
    const small = shrinkResult(loop, port, result, options);
    simulations += small.simulations;
    const name = counterexampleName(result.id, result.scenario);
    counterexamples.push({ name, text: small.text });
    return { ...result, counterexample: name };
  });
  return { results: named, counterexamples, simulations };
}

function shrinkResult(
  loop: LoopSpec,
  port: ControllerPort,
  result: RequirementResult,
  options: VerifyOptions,
) {
  const index = loop.scenarios.findIndex(({ name }) => name === result.scenario);
  const scenario = loop.scenarios[index];
  const requirements = requirementsOf(loop, scenario);
  const column = requirements.findIndex(({ id }) => id === result.id);
  const run = scenarioRunner(loop, scenario, port);
  const kind = result.violations > 0 ? "random" : "corner";
  const worst = kind === "random" ? result.worst : result.corners.worst;
  if (worst === undefined) throw new Error("a violated requirement has a worst run");
  const start = drawOf(loop, index, kind, options.seed, worst.run);
  const small = shrink(scenario, start, (draw) => run(draw).margins[column], options.shrinkBudget);
  const requirement = requirements[column];
  const { draw, margin, simulations } = small;
  const text = writeCounterexample(loop, {
    scenario,
    requirement,
    draw,
    margin,
    hashes: loopHashes(options.whole ?? loop),
  });
  return { text, simulations };
}
