import {
  collectFindings,
  type Diagnostic,
  parseText,
  readBlock,
  type Source,
  type Value,
} from "../../spec/index.ts";
import { COUNTEREXAMPLE_FILE, type Counterexample, type ReadCounterexample } from "./counterexample.ts";

export interface CounterexampleResult {
  /** Only without an error. */
  readonly counterexample?: Counterexample;
  readonly diagnostics: readonly Diagnostic[];
}

/** Reads a counterexample file: its content, or everything that is wrong with its text. Never throws for bad text. */
export function readCounterexample(source: Source): CounterexampleResult {
  const findings = collectFindings();
  const root = parseText(source, findings.report);
  if (root === undefined) return { diagnostics: findings.sorted() };
  const read = readBlock(root, COUNTEREXAMPLE_FILE, "the file", { report: findings.report, choices: {} });
  if (findings.anyError()) return { diagnostics: findings.sorted() };
  const whole = read as unknown as Value<typeof COUNTEREXAMPLE_FILE, "whole">;
  return { counterexample: assemble(whole.counterexample), diagnostics: findings.sorted() };
}

function assemble(read: ReadCounterexample): Counterexample {
  return {
    spec: read.spec,
    scenario: read.scenario,
    requirement: read.requirement,
    says: read.says ?? "",
    margin: read.margin.value,
    hashes: { controller: read.controllerHash, plantAndTests: read.testsHash },
    values: read.values.map(({ name, value, places }) => ({
      name,
      written: value,
      nameAt: places.name,
      at: places.value,
    })),
    plantScatter: read.plantScatter.map(({ parameter, share, places }) => ({
      parameter,
      share: share.value,
      at: places.parameter,
    })),
    noise: read.noise === "on",
    noiseSeed: read.noiseSeed.value >>> 0,
    faults: read.faults.map(({ value }) => value),
    ...(read.endsAt && { endsAt: read.endsAt.value }),
    places: read.places,
  };
}
