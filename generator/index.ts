// The door of generator: a checked spec and the runtime's text in, code for every target out. No disk, no clock.
export { type Difference, firstDifference, recordedSteps } from "./agreement/compare.ts";
export { type FrameLayout, frameLayout } from "./agreement/frames.ts";
export { type Frames, hostileCalibration, hostileFrames } from "./agreement/hostile-inputs.ts";
export { type Recording, runModule, specifiedCalibration } from "./agreement/run-module.ts";
export type { WordBuffer } from "./agreement/word-buffer.ts";
export { printHarness } from "./c/harness.ts";
export { ARITHMETIC, WARNINGS } from "./c/makefile.ts";
export { printC } from "./c/print-c.ts";
export { type Compiled, type CompileInput, compileProgram } from "./compile-program.ts";
export { packRuntime, useParsedRuntime } from "./front/prepared-runtime.ts";
export { REFUSALS, type Refusal, type RefusalCode } from "./front/refusals.ts";
export { type InterpretedFunction, interpretProgram } from "./interpret/interpret-program.ts";
export type { Value } from "./interpret/operations.ts";
export { OPERATOR_NAMES, OPERATORS, type OperatorName } from "./ir/operators.ts";
export type { Program } from "./ir/program.ts";
export { generateKit, type Kit, kitFiles } from "./kit/generate-kit.ts";
export { type Layout, type LayoutEntry, type LayoutStruct, layoutOf } from "./layout/layout.ts";
export { type Leaf, leavesOf } from "./layout/leaves.ts";
export { getAt, type Naming, type StructObject, setAt } from "./layout/objects.ts";
export { javascriptOf, loadJavaScript, loadTypeScript } from "./load/load-typescript.ts";
export type { CalibrationInfo, CalibrationValue, Entry, Lowered, Precision, StructRole } from "./lowered.ts";
export { lowerSpec } from "./lowering/lower-spec.ts";
export { stemFrom } from "./print/identifiers.ts";
export {
  type ControllerModule,
  type GeneratedExports,
  generatedModule,
  interpretedModule,
} from "./run/controller-module.ts";
export { runtimeView } from "./run/runtime-view.ts";
export { printTypeScript } from "./typescript/print-typescript.ts";
export { GENERATOR_VERSION } from "./version.ts";
