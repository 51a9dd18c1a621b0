import { Document, isMap, visit } from "yaml";
import { collectFindings, type LoopSpec, type RequirementSpec, type ScenarioSpec } from "../../spec/index.ts";
import type { Draw } from "../draw.ts";
import { freeValues } from "../fix-scenario.ts";
import { writtenExactly } from "../free-units.ts";
import { scatterNames } from "../scatter.ts";
import { readFreeValue } from "./read-free-value.ts";

export interface FoundViolation {
  readonly scenario: ScenarioSpec;
  readonly requirement: RequirementSpec;
  readonly draw: Draw;
  readonly margin: number;
  readonly hashes: { readonly controller: string; readonly plantAndTests: string };
}

/** Name of the file of a violation: one for each requirement and scenario. */
export function counterexampleName(requirement: string, scenario: string): string {
  return `${requirement}.${scenario}.counterexample.yaml`;
}

/** The text of a counterexample file: readable, diffable, and the same run to the bit when read back. */
export function writeCounterexample(loop: LoopSpec, found: FoundViolation): string {
  const { scenario, requirement, draw } = found;
  const name = counterexampleName(requirement.id, scenario.name);
  const spec = loop.file.split("/").pop() ?? loop.file;
  const body = {
    spoolwright: 1,
    counterexample: {
      spec,
      scenario: scenario.name,
      requirement: requirement.id,
      says: requirement.says,
      margin: found.margin,
      controller_hash: found.hashes.controller,
      tests_hash: found.hashes.plantAndTests,
      values: freeValues(scenario).map((value, index) => ({
        name: value.name,
        value: writtenExactly(draw.values[index], value.base, value.free.unit, (text) =>
          readFreeValue(text, scenario.at, value, { report: collectFindings().report, choices: {} }),
        ),
      })),
      plant_scatter: scatterNames(scenario.plantScatter)
        .map((parameter, index) => ({ parameter, share: draw.scatter[index] }))
        .filter(({ share }) => share !== 0),
      noise: draw.noise > 0 ? "on" : "off",
      noise_seed: draw.noiseSeed,
      faults: draw.faults.flatMap((kept, index) => (kept ? [index + 1] : [])),
      ...(draw.duration !== undefined && { ends_at: `${draw.duration} s` }),
    },
  };
  return `${HEAD}#   spoolwright replay ${name}\n${yamlText(body)}`;
}

/** YAML with each entry of a list on one line. */
function yamlText(body: object): string {
  const document = new Document(body);
  visit(document, {
    Seq(_, list) {
      for (const item of list.items) if (isMap(item)) item.flow = true;
    },
  });
  return document.toString({ lineWidth: 0 });
}

const HEAD = `# A run that violates a requirement, made as small as it was found to get.
# Values that do not matter stand at their simplest: nominal plant, no noise, round numbers.
# To run it again:
`;
