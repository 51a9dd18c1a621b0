import { assemblePlant } from "./assemble/plant.ts";
import type { Diagnostic } from "./diagnostic.ts";
import { collectFindings, type Findings } from "./diagnostics/report.ts";
import type { PlantSpec } from "./plant-spec.ts";
import { readFile } from "./read/read-block.ts";
import { checkPlant } from "./rules/plant-rules.ts";
import type { Value } from "./table/kind.ts";
import { PLANT_FILE } from "./table/loop-table.ts";
import { parseSource } from "./text/parse.ts";
import type { Source } from "./text/source.ts";
import { trustBefore } from "./text/trust-before.ts";

type Whole = Value<typeof PLANT_FILE, "whole">;

export interface PlantResult {
  /** Only without an error. */
  readonly plant?: PlantSpec;
  readonly diagnostics: readonly Diagnostic[];
}

/** Reads a plant file: the plant in SI units, or what is wrong with it. Never throws for bad text. */
export function readPlant(source: Source): PlantResult {
  const findings = collectFindings();
  const plant = readPlantInto(source, findings);
  return { ...(plant === undefined ? {} : { plant }), diagnostics: findings.sorted() };
}

/** As `readPlant`, adding to findings that are already there; undefined when this file has an error. */
export function readPlantInto(source: Source, findings: Findings): PlantSpec | undefined {
  const own = collectFindings();
  const parsed = parseSource(source, own.report);
  const report = trustBefore(parsed?.brokenFrom, own.report);
  const read = parsed && readFile(parsed.root, PLANT_FILE, { report, choices: {} });
  if (read?.plant !== undefined) checkPlant(read.plant, report);
  findings.include(own.sorted());
  return own.anyError() || read === undefined ? undefined : assemblePlant((read as Whole).plant);
}
