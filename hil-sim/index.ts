export {
  type ControllerInput,
  type ControllerOutput,
  type ControllerPort,
  MODES,
} from "./controller-port.ts";
export type { DrawnScenario, FixedCourse, FixedFault, FixedPoint } from "./drawn-scenario.ts";
export { exponential, naturalLog, powerOf, standardPressure } from "./exact-math.ts";
export { FAULT_KINDS, type FaultKindName } from "./faults.ts";
export { type LoopPlant, type LoopStart, type RunSummary, runLoop } from "./loop/run-loop.ts";
export { startOfRun, startPoint } from "./loop/start-of-run.ts";
export type { InputRow, OutputRow } from "./open-loop/input-row.ts";
export { openLoopCsv } from "./open-loop/open-loop-csv.ts";
export { INPUT_COLUMNS, type InputProblem, type InputsResult, readInputs } from "./open-loop/read-inputs.ts";
export { type OpenLoopResult, simulateOpenLoop } from "./open-loop/simulate-open-loop.ts";
export { inletPressure } from "./plant/air-filter.ts";
export { chokeFlow, peakFlow, usableHead } from "./plant/compressor.ts";
export { compressorOutletPressure } from "./plant/intercooler.ts";
export { newPlantFaults, type PlantFaults } from "./plant/plant-input.ts";
export {
  copyPlantParameters,
  type ParameterName,
  type PlantParameters,
  plantParameters,
} from "./plant/plant-parameters.ts";
export type { PlantState } from "./plant/plant-state.ts";
export { wastegateArea } from "./plant/wastegate.ts";
export {
  type NormalSource,
  nextBits,
  nextNormal,
  nextUniform,
  normalSource,
  type RandomState,
  randomStream,
} from "./random.ts";
export { applyScatter, SCATTER_SETS, type ScatterEntry, type ScatterSet, uniformScatter } from "./scatter.ts";
export { type Equilibrium, equilibriumAt, equilibriumHolding } from "./steady/equilibrium.ts";
export {
  type OpeningForBoost,
  openingForBoost,
  type ReachableBoost,
  reachableBoost,
} from "./steady/opening-for-boost.ts";
export type { OperatingPoint } from "./steady/operating-point.ts";
export { newTrace, type Trace, traceCapacity } from "./trace.ts";
export { traceHash } from "./trace-hash.ts";
