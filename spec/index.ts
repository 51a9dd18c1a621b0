// The door of spec: YAML text in, checked specs or diagnostics out. No disk, no clock.
export type * from "./controller-spec.ts";
export type { Diagnostic, Severity } from "./diagnostic.ts";
export { CATALOGUE, explain } from "./diagnostics/catalogue.ts";
export type { LoopSpec } from "./loop-spec.ts";
export type { PlantSpec, PressureSensorSpec, TemperatureSensorSpec } from "./plant-spec.ts";
export type { CurveSpec, Duration, Quantity, Range, TableSpec } from "./quantity.ts";
export { type LoopResult, readLoopSpec } from "./read-loop-spec.ts";
export { type PlantResult, readPlant } from "./read-plant.ts";
export type { Comparison, Pattern, RequirementSpec, TraceSignal } from "./requirement-spec.ts";
export { TRACE_SIGNALS } from "./requirement-spec.ts";
export type { Course, CoursePoint, EngineSpeedSpec, FaultSpec, Free, ScenarioSpec } from "./scenario-spec.ts";
export type { Span } from "./span.ts";
export type { OpenNeighbour, Source } from "./text/source.ts";
