import { spawnSync } from "node:child_process";
import { cpSync, symlinkSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { ROOT } from "../support/run-cli.ts";
import { scratchFolder } from "../support/scratch.ts";
import { SMALLEST } from "../support/smallest.ts";

test("a broken installation is our fault: exit 3, what to report, no bare stack", () => {
  const folder = scratchFolder();
  for (const part of ["joined", "cli"])
    cpSync(join(ROOT, "build", part), join(folder, "build", part), { recursive: true });
  cpSync(join(ROOT, "package.json"), join(folder, "package.json"));
  symlinkSync(join(ROOT, "node_modules"), join(folder, "node_modules"));
  const args = [join(folder, "build/cli/main.js"), "generate", SMALLEST, "--out", join(folder, "kit")];
  const run = spawnSync(process.execPath, args, { cwd: ROOT, encoding: "utf8" });
  expect(run).toMatchObject({ status: 3, stdout: "" });
  expect(run.stderr).toContain("this is a fault of the program, not of your file; please report it");
  expect(run.stderr).toContain(`command: spoolwright generate ${SMALLEST}`);
  expect(run.stderr).toContain("the text of the runtime is missing from this installation");
  expect(run.stderr).not.toContain("node_modules");
  expect(run.stderr.split("\n").length).toBeLessThan(10);
});
