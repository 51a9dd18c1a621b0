import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { CATALOGUE, explain, renderDiagnostics } from "../../spec/index.ts";
import { CASES, caseNames, readCase } from "./read-case.ts";

const OPTIONS = { colour: false, width: 80, consequence: "nothing was written" };
const ACCEPT = process.env.ACCEPT_CASE;

describe("each case folder", () => {
  test.each(caseNames())("%s", (name) => {
    const { diagnostics, sources } = readCase(name);
    const rendered = renderDiagnostics(diagnostics, sources, OPTIONS);
    const expected = new URL(`${name}/expected.txt`, CASES);
    if (ACCEPT === name || ACCEPT === "all") writeFileSync(expected, rendered);
    const wanted = existsSync(expected) ? readFileSync(expected, "utf8") : "";
    expect(rendered, `accept with: ACCEPT_CASE=${name} npx vitest run test/diagnostics`).toBe(wanted);
  });
});

describe("codes, cases and explanations", () => {
  const shown = new Set(caseNames().flatMap((name) => readCase(name).diagnostics.map(({ code }) => code)));

  test("every code of the catalogue is shown by a case", () => {
    expect(Object.keys(CATALOGUE).filter((code) => !shown.has(code))).toEqual([]);
  });

  test("every case shows a code of the catalogue, and only such codes", () => {
    expect(caseNames().filter((name) => readCase(name).diagnostics.length === 0)).toEqual([]);
    expect([...shown].filter((code) => explain(code) === undefined)).toEqual([]);
  });

  test("every explanation has a cause, an example and a fix", () => {
    for (const { cause, example, fix } of Object.values(CATALOGUE)) {
      for (const text of [cause, fix]) expect(text).toMatch(/^[A-Z`].*\.$|^.*`\.?$/s);
      expect(example).not.toBe("");
    }
  });

  test("a file is accepted exactly when nothing in it is an error", () => {
    for (const name of caseNames()) {
      const { diagnostics, accepted } = readCase(name);
      expect(accepted, name).toBe(diagnostics.every(({ severity }) => severity !== "error"));
    }
  });

  test("there is no explanation of an unknown code", () => {
    expect(explain("no-such-code")).toBeUndefined();
    expect(explain("toString")).toBeUndefined();
  });
});
