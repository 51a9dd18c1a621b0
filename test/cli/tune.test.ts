import { copyFileSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { ROOT, runCli } from "../support/run-cli.ts";
import { scratchFolder } from "../support/scratch.ts";
import { SKARN24, SKARN24_PLANT, SMALLEST } from "../support/smallest.ts";

/** The complete example with a gate curve that is not the plant's. */
function detuned(): { spec: string; text: string } {
  const folder = scratchFolder();
  const spec = join(folder, "skarn24.yaml");
  const text = readFileSync(join(ROOT, SKARN24), "utf8").replace(/values: \[4, /, "values: [5, ");
  writeFileSync(spec, text);
  copyFileSync(join(ROOT, SKARN24_PLANT), join(folder, "skarn24.plant.yaml"));
  return { spec, text };
}

test("without --write the new lines are shown and the file is left alone", () => {
  const { spec, text } = detuned();
  const run = runCli(["tune", spec]);
  expect(run.code).toBe(0);
  expect(run.out).toMatch(/^ +\d+ \| +values: \[4, /m);
  expect(readFileSync(spec, "utf8")).toBe(text);
});

test("--write changes the values and nothing else; a second time there is nothing to do", () => {
  const { spec, text } = detuned();
  expect(runCli(["tune", spec, "--write"]).out).toContain(`wrote ${spec}`);
  const tuned = readFileSync(spec, "utf8");
  expect(tuned).not.toBe(text);
  const comments = (of: string): string[] => of.match(/#.*$/gm) ?? [];
  expect(comments(tuned)).toEqual(comments(text));
  expect(runCli(["tune", spec, "--write"]).out).toContain("already what the plant says");
});

test("a spec without a plant cannot be tuned", () => {
  expect(runCli(["tune", SMALLEST])).toMatchObject({ code: 2, out: "" });
});
