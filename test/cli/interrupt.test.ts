import { spawn } from "node:child_process";
import { readdirSync } from "node:fs";
import { join } from "node:path";
import { setTimeout as wait } from "node:timers/promises";
import { expect, test } from "vitest";
import { ROOT } from "../support/run-cli.ts";
import { scratchFolder } from "../support/scratch.ts";
import { SKARN24 } from "../support/smallest.ts";

test("an interrupted campaign ends with 130 and leaves nothing half written", async () => {
  const cwd = scratchFolder();
  const args = [
    "verify",
    join(ROOT, SKARN24),
    "--runs",
    "100000",
    "--evidence",
    "e.json",
    "--report",
    "r.html",
  ];
  const child = spawn(process.execPath, [join(ROOT, "build/cli/main.js"), ...args], { cwd, stdio: "ignore" });
  const ended = new Promise((resolve) => child.on("close", (code, signal) => resolve({ code, signal })));
  await wait(4000);
  child.kill("SIGINT");
  expect(await ended).toEqual({ code: 130, signal: null });
  expect(readdirSync(cwd)).toEqual([]);
});
