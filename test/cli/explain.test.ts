import { expect, test } from "vitest";
import { FILE_CODES } from "../../cli/file-findings.ts";
import { CATALOGUE } from "../../spec/index.ts";
import { runCli } from "../support/run-cli.ts";

test("explain prints cause, example and fix", () => {
  const run = runCli(["explain", "wrong-unit"]);
  expect(run).toMatchObject({ code: 0, err: "" });
  expect(run.out).toMatch(/^wrong-unit \(error\)\n[\s\S]*\nexample:\n {2}[\s\S]*\nfix:\n {2}/);
});

test("the command line's own codes are explained and are not the reader's", () => {
  for (const code of Object.keys(FILE_CODES)) {
    expect(runCli(["explain", code]).code).toBe(0);
    expect(Object.hasOwn(CATALOGUE, code)).toBe(false);
  }
});

test("--json has the same content", () => {
  const document = JSON.parse(runCli(["explain", "wrong-unit", "--json"]).out);
  expect(document).toMatchObject({ code: "wrong-unit", severity: "error", cause: expect.any(String) });
});

test.each(["wrong-units", "__proto__", "constructor", ""])("the unknown code %j is wrong use", (code) => {
  const run = runCli(["explain", code]);
  expect(run).toMatchObject({ code: 2, out: "" });
  expect(run.err).toContain("did you mean");
});
