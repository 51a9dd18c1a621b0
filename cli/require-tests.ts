import type { LoopSpec, ScenarioSpec } from "../spec/index.ts";
import { requirementsOf } from "../verification/index.ts";
import { CommandFailure } from "./command-failure.ts";

const list = (names: readonly string[]): string => (names.length > 0 ? names.join(", ") : "none");

/** Ends the command unless the spec has what a closed-loop run needs. */
export function requirePlant(loop: LoopSpec): void {
  if (loop.plant === undefined)
    throw new CommandFailure(`${loop.file} has no plant: add \`plant: ./engine.plant.yaml\``);
}

export function requireScenario(loop: LoopSpec, name: string): ScenarioSpec {
  requirePlant(loop);
  const scenario = loop.scenarios.find((each) => each.name === name);
  if (scenario !== undefined) return scenario;
  const known = list(loop.scenarios.map((each) => each.name));
  throw new CommandFailure(`${loop.file} has no scenario \`${name}\`; it has: ${known}`);
}

/** The loop with only the named requirements and scenarios, if any are named. */
export function selectTests(loop: LoopSpec, only: readonly string[]): LoopSpec {
  const scenarioNames = loop.scenarios.map(({ name }) => name);
  const requirementIds = loop.requirements.map(({ id }) => id);
  const unknown = only.find((name) => !scenarioNames.includes(name) && !requirementIds.includes(name));
  if (unknown !== undefined) {
    throw new CommandFailure(
      `${loop.file} has no requirement or scenario \`${unknown}\`; requirements: ${list(requirementIds)}; scenarios: ${list(scenarioNames)}`,
    );
  }
  const wantedRequirements = requirementIds.filter((id) => only.includes(id));
  const wantedScenarios = scenarioNames.filter((name) => only.includes(name));
  return {
    ...loop,
    requirements: loop.requirements.filter(({ id }) => wantedRequirements.length === 0 || only.includes(id)),
    scenarios: loop.scenarios.filter(({ name }) => wantedScenarios.length === 0 || only.includes(name)),
  };
}

/** Ends the command unless there is something to verify: a requirement asked for by name must meet a scenario. */
export function requireTests(loop: LoopSpec, only: readonly string[]): void {
  requirePlant(loop);
  if (loop.scenarios.length === 0) throw new CommandFailure(`${loop.file} has no scenarios to run`);
  if (loop.requirements.length === 0) throw new CommandFailure(`${loop.file} has no requirements to verify`);
  const asked = new Set(loop.scenarios.flatMap((scenario) => requirementsOf(loop, scenario)));
  const missed = loop.requirements.find((each) => only.includes(each.id) && !asked.has(each));
  if (missed !== undefined) {
    const where = `it is asked of: ${list(missed.scenarios)}`;
    throw new CommandFailure(`\`${missed.id}\` is asked of none of the scenarios to run; ${where}`);
  }
  if (asked.size === 0) throw new CommandFailure(`${loop.file} asks nothing of the scenarios to run`);
}
