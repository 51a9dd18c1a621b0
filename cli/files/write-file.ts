import { closeSync, fsyncSync, mkdirSync, openSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { dirname } from "node:path";
import { describeProblem } from "./describe-problem.ts";

/** A name beside the final one, so that the rename stays on one file system. */
export const partialName = (path: string): string => `${path}.partial-${process.pid}`;

/** Writes and flushes; the name must not exist yet, so nothing is written through a link planted there. */
export function writeNew(path: string, content: string | Uint8Array): void {
  const file = openSync(path, "wx");
  try {
    writeFileSync(file, content);
    fsyncSync(file);
  } finally {
    closeSync(file);
  }
}

/** Writes a whole file or leaves what was there. A symbolic link at `path` is replaced, not followed. */
export function writeFileWhole(path: string, content: string | Uint8Array): void {
  const partial = partialName(path);
  try {
    mkdirSync(dirname(path), { recursive: true });
    writeNew(partial, content);
    renameSync(partial, path);
  } catch (error) {
    rmSync(partial, { force: true });
    throw describeProblem(error, `cannot write ${path}`);
  }
}
