// The door of verification: a checked loop in, evidence, counterexamples and tuned tables out. Disk only in worker files.
export { limitsOf } from "./build-evidence.ts";
export { type Batch, type BatchResult, type Progress, type RunBatch, runCampaign } from "./campaign.ts";
export { compressorMap } from "./compressor-map.ts";
export {
  type CompiledController,
  compileController,
  type GeneratedController,
  loadController,
} from "./controllers/load-controller.ts";
export { type PortFacts, portFromModule } from "./controllers/module-port.ts";
export { portFromRuntime } from "./controllers/runtime-port.ts";
export type { Counterexample } from "./counterexample/counterexample.ts";
export {
  drawOfCounterexample,
  type LocatedCounterexample,
  type LocatedResult,
} from "./counterexample/draw-of-counterexample.ts";
export { type CounterexampleResult, readCounterexample } from "./counterexample/read-counterexample.ts";
export { counterexampleName } from "./counterexample/write-counterexample.ts";
export { type Draw, drawCorner, drawRun, scenarioOf } from "./draw.ts";
export type {
  CodeFigures,
  CompressorMap,
  ControllerFacts,
  Evidence,
  Limits,
  MarginDistribution,
  PlantFacts,
  RequirementResult,
  ScenarioFacts,
  Verdict,
  WorstRun,
  WorstTrace,
} from "./evidence.ts";
export { evidenceText } from "./evidence-text.ts";
export { type FreeValue, freeValues } from "./fix-scenario.ts";
export { loopHashes } from "./loop-hashes.ts";
export { meaningHash } from "./meaning-hash.ts";
export { neverExercised, whyNotExercised } from "./not-exercised.ts";
export { type Command, findCommands } from "./patterns/commands.ts";
export { judge, neededSignals } from "./patterns/judge.ts";
export { percentUp } from "./percent-up.ts";
export { type Replayed, replay } from "./replay.ts";
export { batchRunner } from "./run-batch.ts";
export { type JudgedRun, type RunDraw, requirementsOf, scenarioRunner } from "./run-scenario.ts";
export { scatteredParameters, scatterNames } from "./scatter.ts";
export { placeInSpec, type SpecValue, setInSpec } from "./set-in-spec.ts";
export { type Shrunk, shrink } from "./shrink/shrink.ts";
export { clopperPearsonLower, clopperPearsonUpper, violationUpper95 } from "./statistics.ts";
export { type Tuning, tuneFeedforward, writeTuning } from "./tune.ts";
export { type Verified, type VerifyOptions, verifyLoop } from "./verify.ts";
export { startWorkers, type WorkerPool, type WorkerStart } from "./worker-pool.ts";
