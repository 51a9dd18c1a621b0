import { chmodSync, existsSync, readFileSync, symlinkSync, writeFileSync } from "node:fs";
import { delimiter, join } from "node:path";
import { expect, test } from "vitest";
import { runCli } from "../support/run-cli.ts";
import { scratchFolder } from "../support/scratch.ts";
import { SMALLEST } from "../support/smallest.ts";

const toolOnPath = (name: string): string =>
  (process.env.PATH ?? "")
    .split(delimiter)
    .map((folder) => join(folder, name))
    .find((path) => existsSync(path)) ?? "";

/** A PATH with gcc, what it calls and a shell, and nothing else. */
function pathWithOnlyGcc(): string {
  const folder = scratchFolder();
  for (const name of ["gcc", "as", "ld", "sh"]) symlinkSync(toolOnPath(name), join(folder, name));
  return folder;
}

test("every target is run and named, and the result is written for the report", () => {
  const out = join(scratchFolder(), "agreement.json");
  const run = runCli(["agree", SMALLEST, "--steps", "2000", "--out", out]);
  expect(run).toMatchObject({ code: 0, err: "" });
  for (const target of ["interpreter", "typescript", "gcc -O0", "gcc -O2", "gcc -O3", "clang -O2"]) {
    expect(run.out).toContain(target);
  }
  const { ok, targets, differences } = JSON.parse(readFileSync(out, "utf8"));
  expect({ ok, differences }).toEqual({ ok: true, differences: [] });
  for (const { steps, differing } of targets) {
    expect(steps).toBeGreaterThan(1500);
    expect(differing).toBe(0);
  }
});

test("where only gcc is installed, clang is named as not run", () => {
  const run = runCli(["agree", SMALLEST, "--steps", "500", "--json"], { env: { PATH: pathWithOnlyGcc() } });
  expect(run.code).toBe(0);
  const { targets, notRun } = JSON.parse(run.out);
  expect(notRun).toEqual([{ name: "clang -O2", why: "clang is not installed" }]);
  expect(targets.map(({ name }: { name: string }) => name)).toContain("gcc -O3");
});

test("without gcc it says so", () => {
  const run = runCli(["agree", SMALLEST], { env: { PATH: scratchFolder() } });
  expect(run).toMatchObject({ code: 2, out: "" });
  expect(run.err).toContain("gcc is not installed");
});

test("a compiler that breaks the arithmetic is found out", () => {
  const folder = scratchFolder();
  const wrapper = join(folder, "gcc");
  writeFileSync(
    wrapper,
    `#!/bin/sh\nexec "${toolOnPath("gcc")}" "$@" -ffast-math -U__FAST_MATH__ -U__FINITE_MATH_ONLY__\n`,
  );
  chmodSync(wrapper, 0o755);
  const run = runCli(["agree", SMALLEST, "--steps", "2000", "--json"], {
    env: { PATH: `${folder}${delimiter}${process.env.PATH}` },
  });
  expect(run.code).toBe(1);
  const { ok, differences } = JSON.parse(run.out);
  expect(ok).toBe(false);
  expect(differences[0].target).toMatch(/^gcc/);
});

test.each(["0", "-1", "x", "1.5"])("--steps %s is wrong use", (steps) => {
  expect(runCli(["agree", SMALLEST, "--steps", steps])).toMatchObject({ code: 2, out: "" });
});
