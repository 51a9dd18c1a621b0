import { assembleController } from "./assemble/controller.ts";
import { assemblePlant } from "./assemble/plant.ts";
import { assembleRequirements } from "./assemble/requirements.ts";
import { assembleScenarios } from "./assemble/scenarios.ts";
import type { Diagnostic } from "./diagnostic.ts";
import { collectFindings, type Findings } from "./diagnostics/report.ts";
import type { LoopSpec } from "./loop-spec.ts";
import type { PlantSpec } from "./plant-spec.ts";
import { choicesOf } from "./read/choices.ts";
import { readFile } from "./read/read-block.ts";
import { readPlantInto } from "./read-plant.ts";
import { checkLoop } from "./rules/loop-rules.ts";
import { checkPlant } from "./rules/plant-rules.ts";
import type { Value } from "./table/kind.ts";
import { LOOP_FILE } from "./table/loop-table.ts";
import { isInside } from "./text/neighbour-path.ts";
import { parseSource } from "./text/parse.ts";
import type { OpenNeighbour, Source } from "./text/source.ts";
import { trustBefore } from "./text/trust-before.ts";

export type HoledLoop = Value<typeof LOOP_FILE, "holed">;
type WholeLoop = Value<typeof LOOP_FILE, "whole">;

export interface LoopResult {
  /** Only without an error. */
  readonly spec?: LoopSpec;
  /** Everything found, sorted by place; warnings and hints may stand beside a spec. */
  readonly diagnostics: readonly Diagnostic[];
}

/** Reads a loop spec and the plant file beside it: the checked spec in base units, or what is wrong. Never throws for bad text. */
export function readLoopSpec(source: Source, openNeighbour: OpenNeighbour): LoopResult {
  const findings = collectFindings();
  const parsed = parseSource(source, findings.report);
  if (parsed === undefined) return { diagnostics: findings.sorted() };
  const { root } = parsed;
  const report = trustBefore(parsed.brokenFrom, findings.report);
  const read = readFile(root, LOOP_FILE, { report, choices: choicesOf(root) });
  const plant =
    typeof read.plant === "object"
      ? inlinePlant(read.plant, findings)
      : readNeighbour(read, openNeighbour, findings);
  checkLoop(read, root, plant, report);
  const spec = findings.anyError() ? undefined : assemble(source.file, read as WholeLoop, plant);
  return { ...(spec === undefined ? {} : { spec }), diagnostics: findings.sorted() };
}

type HoledPlant = Extract<HoledLoop["plant"], object>;

function inlinePlant(read: HoledPlant, findings: Findings): PlantSpec | undefined {
  checkPlant(read, findings.report);
  return findings.anyError() ? undefined : assemblePlant(read as Extract<WholeLoop["plant"], object>);
}

function readNeighbour(read: HoledLoop, open: OpenNeighbour, findings: Findings): PlantSpec | undefined {
  const { plant: path, places } = read;
  if (typeof path !== "string") return undefined;
  const at = places.plant;
  if (!isInside(path)) {
    findings.report({
      code: "plant-path-outside",
      at,
      message: `the plant file \`${path}\` is outside the spec's folder`,
      label: "a path inside the folder, with `/` between names",
      fix: "plant: ./engine.plant.yaml",
    });
    return undefined;
  }
  const file = open(path);
  if (file !== undefined) return readPlantInto(file, findings);
  findings.report({
    code: "plant-file-missing",
    at,
    message: `there is no plant file \`${path}\` beside the spec`,
    label: "cannot be read",
    fix: "correct the path; it is relative to the spec's own folder",
  });
  return undefined;
}

function assemble(file: string, read: WholeLoop, plant: PlantSpec | undefined): LoopSpec {
  return {
    file,
    controller: assembleController(read.controller),
    ...(plant === undefined ? {} : { plant }),
    ...(typeof read.plant === "string" ? { plantFile: read.plant } : {}),
    scenarios: read.scenarios === undefined ? [] : assembleScenarios(read.scenarios),
    requirements: read.requirements === undefined ? [] : assembleRequirements(read.requirements),
  };
}
