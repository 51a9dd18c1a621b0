import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { parse, stringify } from "yaml";
import { readLoopSpec } from "../../spec/index.ts";

const README = readFileSync(new URL("../../spec/README.md", import.meta.url), "utf8");
const FENCES = [...README.matchAll(/```yaml\n(.*?)```/gs)].map(([, text]) => text);
const [SMALLEST, ...OTHERS] = FENCES;

type Sections = Record<string, Record<string, unknown>>;

/** The smallest loop with the fence's sections added or put in place of its own. */
function merged(fence: string): string {
  const [base, added] = [parse(SMALLEST), parse(fence)] as [Sections, Sections];
  const controller: Record<string, unknown> = { ...base.controller };
  for (const [key, value] of Object.entries(added.controller ?? {})) {
    if (key === "target") controller.target = { ...(controller.target as object), ...(value as object) };
    else controller[key] = value;
  }
  if ("stpe" in controller) delete controller.step;
  return stringify({ ...base, ...added, controller });
}

const codesOf = (text: string): readonly string[] =>
  readLoopSpec({ file: "loop.yaml", text }, () => undefined).diagnostics.map(({ code }) => code);

describe("every fence of the README", () => {
  test("there are some of both kinds", () => {
    expect(FENCES.length).toBeGreaterThan(5);
    expect(FENCES.filter((text) => text.startsWith("# error:")).length).toBeGreaterThan(3);
  });

  test("the smallest loop is accepted as it stands", () => {
    expect(codesOf(SMALLEST)).toEqual([]);
  });

  test.each(OTHERS.map((text, i) => [i + 2, text] as const))("fence %d says what it gives", (_, text) => {
    const expected = /^# error: (\S+)/.exec(text);
    expect(codesOf(merged(text))).toEqual(expected === null ? [] : [expected[1]]);
  });
});
