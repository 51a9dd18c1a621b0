import { spawnSync } from "node:child_process";
import { writeFileSync } from "node:fs";
import { join } from "node:path";
import { scratchFolder } from "../support/scratch.ts";

/** Writes files into a folder of the test's own. */
export const writeAll = (files: ReadonlyMap<string, string>): string => {
  const folder = scratchFolder();
  for (const [name, text] of files) {
    writeFileSync(join(folder, name), text);
  }
  return folder;
};

/** Exit code and everything that a program said. */
export const runIn = (folder: string, program: string, args: readonly string[]) => {
  const { status, stdout, stderr } = spawnSync(program, args, { cwd: folder, encoding: "utf8" });
  return { code: status, said: `${stdout}${stderr}` };
};
