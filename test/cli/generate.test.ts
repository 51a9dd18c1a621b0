import { createHash } from "node:crypto";
import { mkdirSync, readdirSync, readFileSync, symlinkSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { runCli } from "../support/run-cli.ts";
import { scratchFolder } from "../support/scratch.ts";
import { SKARN24, SMALLEST, smallestText } from "../support/smallest.ts";

const filesOf = (folder: string): Map<string, string> =>
  new Map(readdirSync(folder).map((name) => [name, readFileSync(join(folder, name), "utf8")]));

test("writes code, calibration, header, twin, build file and manifest, and names them", () => {
  const out = join(scratchFolder(), "kit");
  const run = runCli(["generate", SKARN24, "--out", out]);
  expect(run).toMatchObject({ code: 0, err: "" });
  const names = [...filesOf(out).keys()];
  const expected = [
    "skarn24_boost.c",
    "skarn24_boost.h",
    "skarn24_boost_cal.c",
    "skarn24_boost.ts",
    "Makefile",
    "manifest.json",
  ];
  expect(names).toEqual(expect.arrayContaining(expected));
  for (const name of names) expect(run.out).toContain(`  ${name}  `);
});

test("--json lists every file with its hash", () => {
  const out = join(scratchFolder(), "kit");
  const document = JSON.parse(runCli(["generate", SMALLEST, "--out", out, "--json"]).out);
  const hashes = [...filesOf(out)].map(([path, text]) => ({
    path,
    sha256: createHash("sha256").update(text).digest("hex"),
  }));
  expect(document).toMatchObject({ ok: true, controller: expect.any(String) });
  expect(document.files).toHaveLength(hashes.length);
  expect(document.files).toEqual(expect.arrayContaining(hashes));
});

test("twice the same bytes, from any folder; no path, no date", () => {
  const scratch = scratchFolder();
  runCli(["generate", SMALLEST, "--out", join(scratch, "a")]);
  mkdirSync(join(scratch, "specs"));
  writeFileSync(join(scratch, "specs/smallest.yaml"), smallestText());
  runCli(["generate", "specs/smallest.yaml", "--out", "b"], { cwd: scratch });
  expect(filesOf(join(scratch, "b"))).toEqual(filesOf(join(scratch, "a")));
  const everything = [...filesOf(join(scratch, "a")).values()].join("\n");
  expect(everything).not.toContain(scratch);
  expect(everything).not.toMatch(/\b20\d\d-\d\d-\d\d\b/);
});

test("a spec with an error writes nothing and says so", () => {
  const folder = scratchFolder();
  writeFileSync(join(folder, "loop.yaml"), smallestText().replace(/step: \d+ ms/, "step: 5 kPa"));
  const run = runCli(["generate", "loop.yaml", "--out", "kit"], { cwd: folder });
  expect(run).toMatchObject({ code: 1, out: "" });
  expect(run.err).toContain("nothing was written");
  expect(readdirSync(folder)).toEqual(["loop.yaml"]);
});

test("somebody else's folder is left alone", () => {
  const folder = scratchFolder();
  writeFileSync(join(folder, "thesis.txt"), "years of work");
  const run = runCli(["generate", SMALLEST, "--out", folder]);
  expect(run).toMatchObject({ code: 2, out: "" });
  expect(run.err).toContain("was not written by spoolwright");
  expect(readdirSync(folder)).toEqual(["thesis.txt"]);
});

test("a link in the folder's place is refused", () => {
  const folder = scratchFolder();
  mkdirSync(join(folder, "elsewhere"));
  symlinkSync(join(folder, "elsewhere"), join(folder, "kit"));
  expect(runCli(["generate", SMALLEST, "--out", join(folder, "kit")]).code).toBe(2);
  expect(readdirSync(join(folder, "elsewhere"))).toEqual([]);
});

test("no --out is wrong use", () => {
  const run = runCli(["generate", SMALLEST]);
  expect(run).toMatchObject({ code: 2, out: "" });
  expect(run.err).toContain("--out");
});
