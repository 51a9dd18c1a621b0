import {
  collectFindings,
  type Diagnostic,
  type LoopSpec,
  nearestName,
  type Report,
  type RequirementSpec,
  type ScenarioSpec,
} from "../../spec/index.ts";
import type { Draw } from "../draw.ts";
import { freeValues } from "../fix-scenario.ts";
import { scatterNames } from "../scatter.ts";
import type { Counterexample } from "./counterexample.ts";
import { readFreeValue } from "./read-free-value.ts";

/** What a counterexample names in its spec, and the draw it stands for. */
export interface LocatedCounterexample {
  readonly scenario: ScenarioSpec;
  readonly requirement: RequirementSpec;
  readonly draw: Draw;
}

export interface LocatedResult {
  /** Only without an error. */
  readonly located?: LocatedCounterexample;
  readonly diagnostics: readonly Diagnostic[];
}

/** Finds a counterexample's scenario and requirement in its spec and reads its values by the scenario's units. */
export function drawOfCounterexample(counterexample: Counterexample, loop: LoopSpec): LocatedResult {
  const findings = collectFindings();
  const { report } = findings;
  const { places } = counterexample;
  const scenario = named(loop.scenarios, (each) => each.name, counterexample.scenario);
  const requirement = named(loop.requirements, (each) => each.id, counterexample.requirement);
  const where = `the spec \`${counterexample.spec}\``;
  if (scenario === undefined) {
    const known = loop.scenarios.map(({ name }) => name);
    unknown(report, places.scenario, `${where} has no scenario`, counterexample.scenario, known);
  }
  if (requirement === undefined) {
    const known = loop.requirements.map(({ id }) => id);
    unknown(report, places.requirement, `${where} has no requirement`, counterexample.requirement, known);
  }
  if (scenario === undefined || requirement === undefined) return { diagnostics: findings.sorted() };
  const draw = drawFor(counterexample, scenario, report);
  const result = { diagnostics: findings.sorted() };
  return findings.anyError() ? result : { ...result, located: { scenario, requirement, draw } };
}

function named<Item>(items: readonly Item[], name: (item: Item) => string, wanted: string): Item | undefined {
  return items.find((item) => name(item) === wanted);
}

function unknown(
  report: Report,
  at: Counterexample["places"][string],
  says: string,
  name: string,
  known: readonly string[],
): void {
  const near = nearestName(name, known);
  const label = near === undefined ? `it has ${known.slice(0, 12).join(", ")}` : `did you mean \`${near}\`?`;
  report({ code: "unknown-word", at, message: `${says} \`${name}\``, label });
}

function drawFor(counterexample: Counterexample, scenario: ScenarioSpec, report: Report): Draw {
  const free = freeValues(scenario);
  const where = `scenario \`${scenario.name}\``;
  const names = free.map(({ name }) => name);
  for (const { name, nameAt } of counterexample.values) {
    if (!names.includes(name)) unknown(report, nameAt, `${where} has no free value`, name, names);
  }
  const parameters = scatterNames(scenario.plantScatter);
  for (const { parameter, at } of counterexample.plantScatter) {
    if (!parameters.includes(parameter)) {
      unknown(report, at, `the plant scatter of ${where} has no parameter`, parameter, parameters);
    }
  }
  const { faults, places } = counterexample;
  if (faults.some((number) => number > scenario.faults.length)) {
    const message = `${where} has ${scenario.faults.length} faults`;
    report({ code: "outside-limits", at: places.faults, message });
  }
  return {
    values: free.map((value) => givenValue(counterexample, value, report)),
    scatter: parameters.map(
      (name) => counterexample.plantScatter.find(({ parameter }) => parameter === name)?.share ?? 0,
    ),
    noise: counterexample.noise ? 1 : 0,
    noiseSeed: counterexample.noiseSeed,
    faults: scenario.faults.map((_, index) => faults.includes(index + 1)),
    ...(counterexample.endsAt !== undefined && { duration: counterexample.endsAt }),
  };
}

function givenValue(
  counterexample: Counterexample,
  value: ReturnType<typeof freeValues>[number],
  report: Report,
): number {
  const given = counterexample.values.find(({ name }) => name === value.name);
  if (given === undefined) {
    const message = `the free value \`${value.name}\` of the scenario is not given`;
    report({ code: "missing-key", at: counterexample.places.values, message });
    return value.free.low;
  }
  return readFreeValue(given.written, given.at, value, { report, choices: {} }) ?? value.free.low;
}
