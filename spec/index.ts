// The door of spec: YAML text in, checked specs or diagnostics out. No disk, no clock.
export type {
  ActuatorSpec,
  AirCompensationSpec,
  AntiWindupSpec,
  ControllerSpec,
  Coordinate,
  FailSafeSpec,
  FeedbackSpec,
  Gain,
  OverspeedGuardSpec,
  PressureReference,
  ProportionalGuardSpec,
  Schedule,
  SignalFault,
  SignalName,
  SignalSpec,
  TargetSpec,
  TripSpec,
} from "./controller-spec.ts";
export type { Diagnostic, Severity } from "./diagnostic.ts";
export { CATALOGUE, type Code, explain } from "./diagnostics/catalogue.ts";
export type { Explanation } from "./diagnostics/explanation.ts";
export { diagnosticsJson, type JsonDiagnostics } from "./diagnostics/json.ts";
export { type RenderOptions, renderDiagnostics } from "./diagnostics/render.ts";
export { collectFindings, type Report } from "./diagnostics/report.ts";
export type { LoopSpec } from "./loop-spec.ts";
export { campaignMeaningText, meaningText, plantMeaningText } from "./meaning.ts";
export type { PlantSpec, PressureSensorSpec, TemperatureSensorSpec } from "./plant-spec.ts";
export { convertQuantity } from "./quantities/convert.ts";
export { knownUnit, readUnit } from "./quantities/unit-expression.ts";
export type { CurveSpec, Duration, Quantity, Range, TableSpec } from "./quantity.ts";
// The language itself, for other files written in it (counterexamples).
export type { Context } from "./read/context.ts";
export { readBlock } from "./read/read-block.ts";
export { readQuantity } from "./read/read-quantity.ts";
export { nearestName } from "./read/suggest.ts";
export { type LoopResult, readLoopSpec } from "./read-loop-spec.ts";
export { type PlantResult, readPlant } from "./read-plant.ts";
export type { Comparison, Pattern, RequirementSpec, TraceSignal } from "./requirement-spec.ts";
export { TRACE_SIGNALS } from "./requirement-spec.ts";
export type { Course, CoursePoint, EngineSpeedSpec, FaultSpec, Free, ScenarioSpec } from "./scenario-spec.ts";
export { jsonSchema } from "./schema/json-schema.ts";
export { printSchema } from "./schema/print-schema.ts";
export type { Span } from "./span.ts";
export {
  absolutePressure,
  amount,
  bareUnit,
  block,
  identifier,
  integer,
  list,
  optional,
  path,
  quantity,
  ratioUnit,
  required,
  sentence,
  standard,
  temperatureLevel,
  words,
} from "./table/build.ts";
export { FAULTS, type FaultKindName } from "./table/fault-table.ts";
export type { UnitChoice, Value } from "./table/kind.ts";
export { type DecodeResult, decodeSource } from "./text/decode.ts";
export { parseText } from "./text/parse.ts";
export type { OpenNeighbour, Source } from "./text/source.ts";
