import { lstatSync, mkdirSync, statSync } from "node:fs";
import { dirname } from "node:path";
import { CommandFailure } from "../command-failure.ts";

/** What a look at a path gives, or undefined if nothing is there; Node's own option leaves out a file among the folders. */
export function ifThere<T>(look: () => T): T | undefined {
  try {
    return look();
  } catch (error) {
    const code = error instanceof Error && "code" in error ? error.code : "";
    if (code === "ENOENT" || code === "ENOTDIR") return undefined;
    throw error;
  }
}

/** The topmost folder of a path that is not there yet; undefined if all are. Ends the command if one cannot be. */
export function firstMissing(folder: string): string | undefined {
  const status = ifThere(() => statSync(folder));
  if (status?.isDirectory()) return undefined;
  if (status !== undefined) throw new CommandFailure(`${folder} is a file, not a folder`);
  if (ifThere(() => lstatSync(folder)) !== undefined) {
    throw new CommandFailure(`${folder} is a symbolic link to nothing`);
  }
  const parent = dirname(folder);
  return parent === folder ? folder : (firstMissing(parent) ?? folder);
}

function makeOne(folder: string): void {
  try {
    mkdirSync(folder);
  } catch (error) {
    // Another process may have made it in between.
    if (ifThere(() => statSync(folder))?.isDirectory() !== true) throw error;
  }
}

/**
 * Makes a folder and those above it, one after another: `recursive` of Node's own `mkdir` never returns in a file
 * system that answers "no such folder" to making one, as `/proc` does.
 */
export function makeFolder(folder: string): void {
  if (firstMissing(folder) === undefined) return;
  makeFolder(dirname(folder));
  makeOne(folder);
}
