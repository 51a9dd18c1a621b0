import { execFile } from "node:child_process";
import { mkdtemp, rm, writeFile } from "node:fs/promises";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { promisify } from "node:util";
import type { NativeBuild } from "./builds.ts";

const run = promisify(execFile);

/** A folder of C sources to be compiled in several ways; `remove` deletes it. */
export interface NativeFolder {
  readonly path: string;
  readonly remove: () => Promise<void>;
}

export const writeSources = async (files: ReadonlyMap<string, string>): Promise<NativeFolder> => {
  const path = await mkdtemp(join(tmpdir(), "spoolwright-native-"));
  await Promise.all([...files].map(([name, text]) => writeFile(join(path, name), text)));
  return { path, remove: () => rm(path, { recursive: true, force: true }) };
};

/** Compiles and links; the executable's path. Throws the compiler's words when it refuses. */
export const buildNative = async (
  folder: NativeFolder,
  sources: readonly string[],
  build: NativeBuild,
): Promise<string> => {
  const target = `program-${build.name.replace(/[^a-z0-9]+/gi, "-")}`;
  await run(build.compiler, [...build.flags, "-o", target, ...sources, "-lm"], { cwd: folder.path });
  return join(folder.path, target);
};
