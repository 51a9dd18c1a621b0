import { type ControllerPort, standardPressure } from "../hil-sim/index.ts";
import type { LoopSpec, TraceSignal } from "../spec/index.ts";
import { operatingTrack, significant } from "./compressor-map.ts";
import type { RequirementResult, WorstRun, WorstTrace } from "./evidence.ts";
import { drawOf } from "./run-batch.ts";
import { type JudgedRun, scenarioRunner } from "./run-scenario.ts";

/** What the report plots. */
const SHOWN: readonly TraceSignal[] = [
  "boost_pressure",
  "boost_wanted",
  "boost_target",
  "turbo_speed",
  "engine_speed",
  "accelerator",
  "wastegate_opening",
  "wastegate_command",
  "torque_limit",
  "guard_active",
  "tripped",
];

/** Also recorded, for the compressor's track. */
const RECORDED: readonly TraceSignal[] = [...SHOWN, "compressor_flow"];

/** Samples of a trace are kept this far apart. */
const KEPT_EVERY_S = 0.01;

/**
 * Makes the worst random run of each requirement again, and its worst corner run where a corner violates it; each run
 * once. Points the results at their traces.
 */
export function worstTraces(
  loop: LoopSpec,
  port: ControllerPort,
  seed: number,
  results: readonly RequirementResult[],
): { readonly traces: WorstTrace[]; readonly results: RequirementResult[] } {
  const traces: WorstTrace[] = [];
  const places = new Map<string, number>();
  const pointed = (worst: WorstRun, scenario: string, kind: WorstTrace["kind"]): WorstRun => {
    const key = `${kind} ${worst.run} ${scenario}`;
    if (!places.has(key))
      places.set(key, traces.push(traceOfRun(loop, port, seed, scenario, kind, worst.run)) - 1);
    return { ...worst, trace: places.get(key) as number };
  };
  const withTraces = results.map((result) => {
    const { worst, corners, scenario } = result;
    const corner = corners.violations > 0 ? corners.worst : undefined;
    return {
      ...result,
      ...(worst && { worst: pointed(worst, scenario, "random") }),
      ...(corner && { corners: { ...corners, worst: pointed(corner, scenario, "corner") } }),
    };
  });
  return { traces, results: withTraces };
}

function traceOfRun(
  loop: LoopSpec,
  port: ControllerPort,
  seed: number,
  name: string,
  kind: WorstTrace["kind"],
  run: number,
): WorstTrace {
  const index = loop.scenarios.findIndex((scenario) => scenario.name === name);
  const make = scenarioRunner(loop, loop.scenarios[index], port, RECORDED);
  return keptTrace(name, kind, run, make(drawOf(loop, index, kind, seed, run)));
}

function keptTrace(scenario: string, kind: WorstTrace["kind"], run: number, judged: JudgedRun): WorstTrace {
  const { trace, parameters } = judged;
  const every = Math.floor(KEPT_EVERY_S / trace.step + 0.5);
  const samples = Array.from({ length: Math.floor((trace.length - 1) / every) + 1 }, (_, k) => k * every);
  const signals: Partial<Record<TraceSignal, number[]>> = {};
  for (const name of SHOWN) signals[name] = samples.map((k) => significant(trace.signals[name]?.[k] ?? 0));
  const { altitude, temperature } = judged.scenario.ambient;
  return {
    scenario,
    kind,
    run,
    stepS: significant(every * trace.step),
    signals,
    mode: samples.map((k) => trace.mode?.[k] ?? 0),
    operating: operatingTrack(
      parameters,
      { pressure: standardPressure(altitude), temperature },
      trace,
      samples,
    ),
  };
}
