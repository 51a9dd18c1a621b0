import { realpathSync } from "node:fs";
import { dirname, join, sep } from "node:path";
import { type Diagnostic, decodeSource, type OpenNeighbour, type Source } from "../spec/index.ts";
import { fileFinding } from "./file-findings.ts";
import { readLimited, SPEC_LIMIT_BYTES } from "./files/read-limited.ts";

export interface LoadedSource {
  readonly source?: Source;
  readonly diagnostics: readonly Diagnostic[];
}

/** A spec, plant or counterexample file as text, or the finding that says why not. */
export function loadSource(path: string): LoadedSource {
  const outcome = readLimited(path, SPEC_LIMIT_BYTES);
  return outcome.ok
    ? decodeSource(path, outcome.bytes)
    : { diagnostics: [fileFinding(path, outcome.problem)] };
}

/** True if `path`, with links followed, still lies in the folder. */
function staysIn(folder: string, path: string): boolean {
  try {
    return realpathSync(path).startsWith(realpathSync(folder) + sep);
  } catch {
    return false;
  }
}

export interface Neighbours {
  readonly open: OpenNeighbour;
  /** The files opened, for showing their lines. */
  readonly sources: Source[];
  /** What was wrong with those that could not be opened. */
  readonly diagnostics: Diagnostic[];
}

/** Opens files beside a spec, never outside its folder, not even through a symbolic link. */
export function neighboursOf(specPath: string): Neighbours {
  const folder = dirname(specPath);
  const sources: Source[] = [];
  const diagnostics: Diagnostic[] = [];
  const open: OpenNeighbour = (path) => {
    const full = join(folder, path);
    if (!staysIn(folder, full)) return undefined;
    const loaded = loadSource(full);
    diagnostics.push(...loaded.diagnostics);
    if (loaded.source !== undefined) sources.push(loaded.source);
    return loaded.source;
  };
  return { open, sources, diagnostics };
}
