import { expect, test } from "vitest";
import { runCli } from "../support/run-cli.ts";

test("an unknown command is wrong use and names the nearest one", () => {
  const run = runCli(["chek"]);
  expect(run.code).toBe(2);
  expect(run.err).toContain("check");
  expect(run.out).toBe("");
});

test("help and version are fine and go to standard output", () => {
  expect(runCli(["--help"])).toMatchObject({ code: 0, err: "" });
  expect(runCli(["--version"]).out).toMatch(/^\d+\.\d+\.\d+\n$/);
});

test("no command at all is wrong use and shows the help", () => {
  const run = runCli([]);
  expect(run.code).toBe(2);
  expect(run.err).toContain("Usage: spoolwright");
});
