import { spawnSync } from "node:child_process";
import { join } from "node:path";

export const ROOT = join(import.meta.dirname, "../..");
const MAIN = join(ROOT, "build/cli/main.js");

export interface CliRun {
  readonly code: number | null;
  readonly out: string;
  readonly err: string;
}

/** Runs the built command line (`npm run build` first) in a folder; colour never reaches a pipe. */
export function runCli(
  args: readonly string[],
  options: { cwd?: string; env?: NodeJS.ProcessEnv } = {},
): CliRun {
  const run = spawnSync(process.execPath, [MAIN, ...args], {
    cwd: options.cwd ?? ROOT,
    env: { ...process.env, ...options.env },
    encoding: "utf8",
    maxBuffer: 64 * 1024 * 1024,
  });
  return { code: run.status, out: run.stdout, err: run.stderr };
}
