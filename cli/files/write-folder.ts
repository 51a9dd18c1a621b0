import { existsSync, lstatSync, mkdirSync, readdirSync, readFileSync, renameSync, rmSync } from "node:fs";
import { dirname, isAbsolute, join, resolve, sep } from "node:path";
import { CommandFailure } from "../command-failure.ts";
import { describeProblem } from "./describe-problem.ts";
import { ifThere, makeFolder } from "./make-folder.ts";
import { discard, partialName, writeNew } from "./write-file.ts";

const MANIFEST = "manifest.json";

/** Refuses names that would leave the folder; the generator makes the names, this is the last line of defence. */
function placeInside(folder: string, name: string): string {
  const path = resolve(folder, name);
  if (isAbsolute(name) || !path.startsWith(resolve(folder) + sep)) {
    throw new CommandFailure(`refusing to write ${JSON.stringify(name)}: it lies outside the output folder`);
  }
  return path;
}

/** Top-level names that an earlier run wrote, from its manifest; undefined: the folder is not ours. */
function namesWrittenBefore(folder: string): ReadonlySet<string> | undefined {
  try {
    const manifest: unknown = JSON.parse(readFileSync(join(folder, MANIFEST), "utf8"));
    const files = (manifest as { files?: unknown }).files;
    const list = Array.isArray(files)
      ? files.map((file: { path?: unknown }) => file.path)
      : Object.keys(Object(files));
    if (files === undefined || files === null) return undefined;
    return new Set([MANIFEST, ...list.map((path) => String(path).split("/")[0])]);
  } catch {
    return undefined;
  }
}

/** What stands at the output folder's name: nothing or an empty folder, or an earlier output whose other files are kept. */
function inspect(folder: string): { readonly keep: readonly string[] } {
  const status = ifThere(() => lstatSync(folder));
  if (status === undefined) return { keep: [] };
  if (status.isSymbolicLink())
    throw new CommandFailure(`${folder} is a symbolic link; name the folder itself`);
  if (!status.isDirectory()) throw new CommandFailure(`${folder} is a file, not a folder`);
  const entries = readdirSync(folder);
  if (entries.length === 0) return { keep: [] };
  const ours = namesWrittenBefore(folder);
  if (ours === undefined) {
    throw new CommandFailure(
      `${folder} is not empty and was not written by spoolwright (no ${MANIFEST}); choose another folder`,
    );
  }
  return { keep: entries.filter((name) => !ours.has(name)) };
}

function fill(folder: string, files: ReadonlyMap<string, string>): void {
  mkdirSync(folder);
  for (const [name, text] of files) {
    const path = placeInside(folder, name);
    mkdirSync(dirname(path), { recursive: true });
    writeNew(path, text);
  }
}

/** Moves the old folder back; the error of the new one stays the one to be told. */
function restored(old: string, folder: string, error: unknown): unknown {
  try {
    renameSync(old, folder);
    return error;
  } catch {
    return describeProblem(error, `cannot replace ${folder}, whose earlier content is now ${old}`);
  }
}

/** Puts the new folder in the old one's place; files that are not ours move along. */
function swap(fresh: string, folder: string, keep: readonly string[]): void {
  const old = `${folder}.previous-${process.pid}`;
  const replaces = existsSync(folder);
  if (replaces) renameSync(folder, old);
  try {
    renameSync(fresh, folder);
  } catch (error) {
    throw replaces ? restored(old, folder, error) : error;
  }
  for (const name of keep) {
    if (!existsSync(join(folder, name))) renameSync(join(old, name), join(folder, name));
  }
  if (replaces) rmSync(old, { recursive: true });
}

/** Writes a folder of files whole or not at all. Refuses links, and folders with content that is not ours. */
export function writeFolderWhole(folder: string, files: ReadonlyMap<string, string>): void {
  const target = resolve(folder);
  const { keep } = inspect(target);
  const collision = keep.find((name) => [...files.keys()].some((file) => file.split("/")[0] === name));
  if (collision !== undefined) {
    throw new CommandFailure(
      `${folder} holds a ${collision} that spoolwright did not write; move it away first`,
    );
  }
  const fresh = partialName(target);
  try {
    makeFolder(dirname(target));
    fill(fresh, files);
    swap(fresh, target, keep);
  } catch (error) {
    discard(fresh);
    throw describeProblem(error, `cannot write ${folder}`);
  }
}
