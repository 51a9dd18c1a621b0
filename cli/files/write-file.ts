import { closeSync, fsyncSync, openSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { dirname, resolve } from "node:path";
import { describeProblem } from "./describe-problem.ts";
import { makeFolder } from "./make-folder.ts";

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

/** Removes what a failed write left; where even that fails, the error that led here says more. */
export function discard(partial: string): void {
  try {
    rmSync(partial, { recursive: true, force: true });
  } catch {}
}

/** Writes a whole file or leaves what was there. A symbolic link at `path` is replaced, not followed. */
export function writeFileWhole(path: string, content: string | Uint8Array): void {
  const partial = partialName(path);
  try {
    makeFolder(dirname(resolve(path)));
    writeNew(partial, content);
    renameSync(partial, path);
  } catch (error) {
    discard(partial);
    throw describeProblem(error, `cannot write ${path}`);
  }
}
