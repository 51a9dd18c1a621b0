import {
  type ControllerPort,
  type DrawnScenario,
  type LoopPlant,
  newTrace,
  type PlantParameters,
  plantParameters,
  runLoop,
  type Trace,
} from "../hil-sim/index.ts";
import type { LoopSpec, PlantSpec, RequirementSpec, ScenarioSpec, TraceSignal } from "../spec/index.ts";
import { type Draw, scenarioOf } from "./draw.ts";
import { findCommands } from "./patterns/commands.ts";
import { followsTarget, judge, neededSignals } from "./patterns/judge.ts";
import { reachOfCommands } from "./reachability.ts";
import { scatteredParameters } from "./scatter.ts";

/** One run and how every requirement of its scenario came out. The trace is overwritten by the next run. */
export interface JudgedRun {
  readonly scenario: DrawnScenario;
  readonly parameters: PlantParameters;
  readonly trace: Trace;
  /** One per requirement of the scenario; undefined: not exercised. */
  readonly margins: readonly (number | undefined)[];
  readonly leftValidity: boolean;
  readonly clamped: boolean;
}

export type RunDraw = (draw: Draw) => JudgedRun;

/** Requirements that apply to a scenario, in the order of the spec. */
export function requirementsOf(loop: LoopSpec, scenario: ScenarioSpec): RequirementSpec[] {
  return loop.requirements.filter(
    ({ scenarios }) => scenarios.length === 0 || scenarios.includes(scenario.name),
  );
}

/**
 * Makes runs of one scenario in the closed loop: one simulation serves all its requirements.
 * `signals`: what to record beside what the requirements need.
 * @throws when the spec has no plant: the caller checks.
 */
export function scenarioRunner(
  loop: LoopSpec,
  scenario: ScenarioSpec,
  port: ControllerPort,
  signals: readonly TraceSignal[] = [],
): RunDraw {
  const { plant } = loop;
  if (plant === undefined) throw new Error("a spec without a plant cannot be run");
  const nominal = plantParameters(plant);
  const requirements = requirementsOf(loop, scenario);
  const restOpening = loop.controller.actuator.restOpening.value;
  const leastBoost = loop.controller.target.leastBoost.value;
  const trace = newTrace(recordedSignals(requirements, signals), scenario.duration.high, signals.length > 0);
  return (draw) => {
    const fixed = scenarioOf(scenario, draw);
    const parameters = scatteredParameters(nominal, scenario.plantScatter, draw.scatter);
    const summary = runLoop(loopPlant(plant, parameters), fixed, port, trace, { restOpening });
    return {
      scenario: fixed,
      parameters,
      trace,
      margins: judgeAll(requirements, leastBoost, parameters, fixed, trace),
      leftValidity: summary.leftValidity,
      clamped: summary.clamps > 0 || summary.sawNotANumber,
    };
  };
}

function loopPlant(plant: PlantSpec, parameters: PlantParameters): LoopPlant {
  return { parameters, sensors: plant.sensors, validity: plant.validity };
}

function recordedSignals(
  requirements: readonly RequirementSpec[],
  more: readonly TraceSignal[],
): TraceSignal[] {
  const following = requirements.some(({ pattern }) => followsTarget(pattern));
  const always: TraceSignal[] = following ? ["boost_wanted", "engine_speed", "accelerator"] : [];
  return [...new Set([...always, ...more, ...requirements.flatMap(({ pattern }) => neededSignals(pattern))])];
}

function judgeAll(
  requirements: readonly RequirementSpec[],
  leastBoost: number,
  parameters: PlantParameters,
  scenario: DrawnScenario,
  trace: Trace,
): (number | undefined)[] {
  const following = requirements.filter(({ pattern }) => followsTarget(pattern));
  const commands = following.length > 0 ? findCommands(trace) : [];
  const reach = following.some(({ onlyIfReachable }) => onlyIfReachable)
    ? reachOfCommands(parameters, scenario, trace, commands, leastBoost)
    : [];
  const held = commands.filter((_, index) => reach[index]?.holds);
  const roomy = commands.filter((_, index) => reach[index]?.withRoom);
  return requirements.map(({ pattern, onlyIfReachable }) => {
    const reachable = pattern.kind === "rises" ? held : roomy;
    return judge(pattern, trace, onlyIfReachable ? reachable : commands);
  });
}
