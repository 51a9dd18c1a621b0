import { existsSync, readFileSync, writeFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { CATALOGUE, type Diagnostic, explain, renderDiagnostics } from "../../spec/index.ts";
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

/** `key: value` on one line, without brackets. */
const ONE_LINE = /^([a-z_]+): ([^{}[\]#]+)$/;

/** The case's text with the fix in the place of the key the finding points into; undefined when there is no such line. */
function repaired(text: string, { at, fix = "" }: Diagnostic): string | undefined {
  const [, key] = ONE_LINE.exec(fix) ?? [];
  const lines = text.split("\n");
  const line = lines[at.line - 1] ?? "";
  const start = line.lastIndexOf(` ${key}:`, at.column - 1) + 1;
  if (key === undefined || at.file !== "loop.yaml" || start === 0) return undefined;
  const [old] = /^[a-z_]+: *("[^"]*"|[^,{}[\]]*)/.exec(line.slice(start)) ?? [""];
  lines[at.line - 1] = line.slice(0, start) + fix + line.slice(start + old.length);
  return lines.join("\n");
}

describe("a fix that is one line", () => {
  const fixable = caseNames().flatMap((name) => {
    const { diagnostics, sources } = readCase(name);
    const text = diagnostics.length === 1 ? repaired(sources[0]?.text ?? "", diagnostics[0]) : undefined;
    return text === undefined ? [] : [{ name, text, diagnostic: diagnostics[0] }];
  });

  test("is offered by many cases", () => {
    expect(fixable.length).toBeGreaterThan(30);
  });

  test.each(fixable)("can be pasted: $name", ({ name, text, diagnostic }) => {
    const again = readCase(name, text).diagnostics;
    expect(
      again.filter(({ code, at }) => code === diagnostic.code && at.line === diagnostic.at.line),
    ).toEqual([]);
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
