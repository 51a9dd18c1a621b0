import { describe, expect, test } from "vitest";
import { collectFindings } from "../../../spec/diagnostics/report.ts";
import { valueAt } from "../../../spec/text/node.ts";
import { parseSource } from "../../../spec/text/parse.ts";

function parse(text: string) {
  const findings = collectFindings();
  const parsed = parseSource({ file: "f", text }, findings.report);
  return { root: parsed?.root, codes: findings.sorted().map(({ code }) => code) };
}

describe("YAML to plain nodes", () => {
  test("scalars keep their text as written; nothing is guessed to be a number or a boolean", () => {
    const { root } = parse('a: 1e3\nb: on\nc: 0x10\nd: "5 ms"\ne: 2026-01-01\nf: ~\n');
    const text = (key: string) => valueAt(root, [key]);
    expect(text("a")).toMatchObject({ text: "1e3", quoted: false });
    expect(text("b")).toMatchObject({ text: "on" });
    expect(text("c")).toMatchObject({ text: "0x10" });
    expect(text("d")).toMatchObject({ text: "5 ms", quoted: true });
    expect(text("e")).toMatchObject({ text: "2026-01-01" });
    expect(text("f")).toMatchObject({ text: "~" });
  });

  test("every value has its place, with windows line ends too", () => {
    for (const end of ["\n", "\r\n"]) {
      const { root } = parse(["a:", "  b: [1, 22]", "c: x"].join(end));
      const list = valueAt(root, ["a", "b"]);
      expect(list?.kind === "list" && list.items[1].at).toMatchObject({ line: 2, column: 10, endColumn: 12 });
      expect(valueAt(root, ["c"])?.at).toMatchObject({ line: 3, column: 4, endLine: 3, endColumn: 5 });
    }
  });

  test("an alias stands for its anchor's value, whole maps included", () => {
    const { root, codes } = parse("a: &x { b: 1 }\nc: *x\nd: [*x, *x]\n");
    expect(codes).toEqual([]);
    expect(valueAt(root, ["c", "b"])).toMatchObject({ text: "1" });
  });

  test("a directive for YAML 1.1 does not turn words into booleans", () => {
    const { root } = parse("%YAML 1.1\n---\na: off\n");
    expect(valueAt(root, ["a"])).toMatchObject({ text: "off" });
  });

  test.each([
    ["a: 1\na: 2\n", ["duplicate-key"]],
    ["a: *x\n", ["unknown-alias"]],
    ["a: &x [*x]\n", ["unknown-alias"]],
    ["a: 1\n---\nb: 2\n", ["several-documents"]],
    ["", ["empty-file"]],
    ["just text\n", ["empty-file"]],
    ["a: [1, 2\n", ["bad-yaml"]],
    ["a:\n\tb: 1\n", ["tab-indentation"]],
    ["a: { unit: % }\n", ["unquoted-percent"]],
    ["\ufeffa: 1\n", ["byte-order-mark"]],
    [`a: ${"[".repeat(61)}`, ["nested-too-deep"]],
  ])("%j gives %j", (text, codes) => {
    expect(parse(text).codes).toEqual(codes);
  });

  test("no key name reaches into the program", () => {
    const { root, codes } = parse("__proto__: { polluted: yes }\nconstructor: 1\n<<: { a: 1 }\n");
    expect(codes).toEqual([]);
    expect(({} as { polluted?: unknown }).polluted).toBeUndefined();
    expect(root?.entries.map(({ key }) => key)).toEqual(["__proto__", "constructor", "<<"]);
  });
});
