import { execFile } from "node:child_process";
import { readFile, writeFile } from "node:fs/promises";
import { join } from "node:path";
import { promisify } from "node:util";
import { type NativeFolder, programName } from "./build-native.ts";
import type { NativeBuild } from "./builds.ts";

const run = promisify(execFile);

/** Feeds the same bytes to every build's program and gathers what each writes; throws when one ends badly. */
export const runNative = async (
  folder: NativeFolder,
  builds: readonly NativeBuild[],
  input: Uint8Array,
): Promise<ReadonlyMap<string, Buffer>> => {
  await writeFile(join(folder.path, "input.bin"), input);
  const commands = builds.map((build) => `./${programName(build)} < input.bin > ${programName(build)}.bin`);
  await run("sh", ["-e", "-c", commands.join("\n")], { cwd: folder.path });
  const outputs = await Promise.all(
    builds.map((build) => readFile(join(folder.path, `${programName(build)}.bin`))),
  );
  return new Map(builds.map(({ name }, i) => [name, outputs[i]]));
};
