import { execFile } from "node:child_process";
import { access, mkdtemp, readFile, rm, writeFile } from "node:fs/promises";
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

/** File name of a build's program in its folder. */
export const programName = ({ name }: NativeBuild): string => `program-${name.replace(/[^a-z0-9]+/gi, "-")}`;

const failed = async (folder: NativeFolder, build: NativeBuild): Promise<string | undefined> => {
  const name = join(folder.path, programName(build));
  const isThere = await access(name).then(
    () => true,
    () => false,
  );
  return isThere ? undefined : `${build.name}: ${await readFile(`${name}.log`, "utf8")}`;
};

/**
 * Compiles and links once per build, all at once, under one shell: starting a process from Node costs as much as a
 * small compilation. Throws the compilers' words when one refuses.
 */
export const buildNative = async (
  folder: NativeFolder,
  sources: readonly string[],
  builds: readonly NativeBuild[],
): Promise<void> => {
  const commands = builds.map((build) => {
    const name = programName(build);
    return `${build.compiler} ${build.flags.join(" ")} -o ${name} ${sources.join(" ")} -lm > ${name}.log 2>&1 &`;
  });
  await run("sh", ["-c", [...commands, "wait"].join("\n")], { cwd: folder.path });
  const failures = await Promise.all(builds.map((build) => failed(folder, build)));
  const said = failures.filter((each) => each !== undefined);
  if (said.length > 0) {
    throw new Error(`the generated C does not compile\n${said.join("\n")}`);
  }
};
