import type { ControllerPort, Trace } from "../hil-sim/index.ts";
import { type LoopSpec, TRACE_SIGNALS, type TraceSignal } from "../spec/index.ts";
import type { LocatedCounterexample } from "./counterexample/draw-of-counterexample.ts";
import { requirementsOf, scenarioRunner } from "./run-scenario.ts";

export interface Replayed {
  /** Undefined: the run does not exercise the requirement any more. */
  readonly margin: number | undefined;
  readonly trace: Trace;
}

/** Runs a counterexample again, with every signal recorded. */
export function replay(loop: LoopSpec, located: LocatedCounterexample, port: ControllerPort): Replayed {
  const { scenario, requirement, draw } = located;
  const signals = Object.keys(TRACE_SIGNALS) as TraceSignal[];
  const run = scenarioRunner(loop, scenario, port, signals)(draw);
  const column = requirementsOf(loop, scenario).findIndex(({ id }) => id === requirement.id);
  return { margin: run.margins[column], trace: run.trace };
}
