import {
  type Diagnostic,
  type LoopSpec,
  type PlantSpec,
  readLoopSpec,
  readPlant,
  type Source,
} from "../spec/index.ts";
import { loadSource, neighboursOf } from "./load-source.ts";

/** What reading gave: a value only without an error, every finding, and the texts for showing their lines. */
export interface Loaded<T> {
  readonly value?: T;
  readonly diagnostics: readonly Diagnostic[];
  readonly sources: readonly Source[];
}

/** Reads a loop spec and the plant file beside it from disk. */
export function loadLoop(path: string): Loaded<LoopSpec> {
  const { source, diagnostics } = loadSource(path);
  if (source === undefined) return { diagnostics, sources: [] };
  const neighbours = neighboursOf(path);
  const { spec, diagnostics: found } = readLoopSpec(source, neighbours.open);
  return {
    ...(spec === undefined ? {} : { value: spec }),
    diagnostics: [...found, ...neighbours.diagnostics],
    sources: [source, ...neighbours.sources],
  };
}

/** Reads a plant file from disk. */
export function loadPlant(path: string): Loaded<PlantSpec> {
  const { source, diagnostics } = loadSource(path);
  if (source === undefined) return { diagnostics, sources: [] };
  const read = readPlant(source);
  return {
    ...(read.plant === undefined ? {} : { value: read.plant }),
    diagnostics: read.diagnostics,
    sources: [source],
  };
}
