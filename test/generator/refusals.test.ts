import { describe, expect, test } from "vitest";
import { compileProgram, REFUSALS, type RefusalCode } from "../../generator/index.ts";
import { SPECIMEN, specimenText } from "./specimen/lowered.ts";

/** Refusals of the specimen with some text in one of its files replaced. */
const refuse = (from: string, to: string, file = "specimen/specimen.ts") => {
  const text = specimenText();
  const original = text.get(file) ?? "";
  expect(original).toContain(from);
  text.set(file, original.replace(from, to));
  return compileProgram({ runtime: text, lowered: SPECIMEN }).refusals;
};

const BODY = "  const level = exchange.level;\n";
const FUNCTION = "function look(";

/** A statement added to the slow step, or a declaration added to the file, and the code it must be refused with. */
const STATEMENTS: readonly (readonly [RefusalCode, string])[] = [
  ["unsupported-loop", "while (level < 3) { exchange.ready = true; }"],
  ["unsupported-loop", "for (const x of state.history) { exchange.level = x; }"],
  ["unsupported-loop", "for (let i = 0; i <= 3; i++) { state.next = i; }"],
  ["unsupported-loop", "for (let i = 0; i < state.next; i++) { state.history[i] = 0; }"],
  ["unsupported-statement", "try { state.next = 0; } catch { state.next = 1; }"],
  ["unsupported-statement", "throw level;"],
  ["unsupported-statement", "var old: Real = 0;"],
  ["unsupported-statement", "level;"],
  ["unsupported-expression", "const list = [level];"],
  ["unsupported-expression", "const made = { level };"],
  ["unsupported-expression", "const late = () => level;"],
  ["unsupported-expression", "const text: Real = `x`;"],
  ["unknown-name", "const power: Real = Math.pow(level, 2);"],
  ["unknown-name", "const nan: Real = NaN;"],
  ["unsupported-operator", "const rest: Real = level % 2;"],
  ["unsupported-operator", "const other: Real = level ?? 2;"],
  ["unsupported-operator", "const power: Real = level ** 2;"],
  ["compound-assignment", "state.inner.value += level;"],
  ["real-equality", "const equal = level === 3;"],
  ["division-of-counts", "const half = state.next / 2;"],
  ["mixed-types", "const sum = level + state.next;"],
  ["wrong-type", "const flag: Flag = level;"],
  ["wrong-type", "const both = input.enable && level;"],
  ["untyped-literal", "const plain = 3;"],
  ["shadowed-name", "const clamp: Real = 1;"],
  ["infinite-constant", "output.resultKpa = 1e39;"],
  ["infinite-constant", "output.resultKpa = 1e30 * 1e30;"],
  ["infinite-constant", "output.resultKpa = 1 / 0;"],
  ["whole-number", "const broken: Count = 1.5;"],
  ["shadowed-name", "if (input.enable) { const level: Real = 1; output.resultKpa = level; }"],
  ["early-return", "if (input.enable) { return; }"],
  ["assigned-parameter", "input = input;"],
  ["assigned-constant", "const fixed: Real = 1; fixed = 2;"],
  ["read-only-field", "input.valueKpa = 3;"],
  ["read-only-field", "calibration.curve.values[0] = 3;"],
  ["struct-as-value", "const copy = state.inner;"],
  ["wrong-arguments", "settle(state, level, 1);"],
  ["wrong-arguments", "settle(state.inner, level);"],
  ["literal-bounds", "state.next = toCount(level, 0, state.next);"],
  ["literal-bounds", "state.next = toCount(level, 0, 16777217);"],
  ["structure-argument", "remember(state, state, level);"],
  ["unknown-name", 'if (state.phase === "bussy") { state.next = 0; }'],
  ["unknown-name", "const missing = state.missing;"],
];

describe("statements outside the language", () => {
  test.each(STATEMENTS)("%s: %s", (code, statement) => {
    const refusals = refuse(BODY, `${BODY}  ${statement}\n`);
    expect(refusals.map((each) => each.code)).toContain(code);
    const [first] = refusals;
    const line = (specimenText().get("specimen/specimen.ts") ?? "").split(BODY)[0].split("\n").length + 1;
    expect(first.at.file).toBe("specimen/specimen.ts");
    expect(first.at.line).toBe(line);
    expect(first.fix).toBe(REFUSALS[first.code as RefusalCode]);
    expect(first.message).not.toMatch(/^[A-Z]|\.$/);
  });
});

const DECLARATIONS: readonly (readonly [RefusalCode, string])[] = [
  ["unsupported-declaration", "class Thing { value = 1; }"],
  ["unsupported-declaration", "export let counter: Count = 0;"],
  ["unsupported-declaration", "export const MADE: Real = 1 / 3;"],
  ["unsupported-declaration", "async function later(): Promise<void> {}"],
  ["unsupported-declaration", "function open(x: Real = 1): Real { return x; }"],
  ["unsupported-type", "export interface Odd { readonly text: string; }"],
  ["unsupported-type", "export interface Raw { readonly value: number; }"],
  ["unsupported-type", "export type Pair = [Real, Real];"],
  ["missing-type", "function untyped(x: Real) { return x; }"],
  ["missing-type", "function untyped(x): Real { return 1; }"],
  ["duplicate-name", "function settle(x: Real): Real { return x; }"],
  ["struct-as-value", "function give(inner: Inner): Inner { return inner; }"],
  ["early-return", "function nothing(x: Real): Real { const y = x; }"],
  ["recursion", "function round(x: Real): Real { const y = round(x); return y; }"],
  ["syntax-error", "function broken(: Real { return 1; }"],
  ["unsupported-loop", "function spin(x: Real): Real { do { } while (x > 0); return x; }"],
];

describe("declarations outside the language", () => {
  test.each(DECLARATIONS)("%s: %s", (code, declaration) => {
    expect(refuse(FUNCTION, `${declaration}\n\n${FUNCTION}`).map((each) => each.code)).toContain(code);
  });

  test("an import from outside the runtime", () => {
    const refusals = refuse(
      '"./structure.ts";',
      '"./structure.ts";\nimport { readFileSync } from "node:fs";',
    );
    expect(refusals.map(({ code }) => code)).toEqual(["outside-import"]);
  });
  test("an import of a name that the file does not declare", () => {
    const refusals = refuse("import type { Structure }", "import type { Structure, Stricture }");
    expect(refusals.map(({ code, message }) => [code, message])).toEqual([
      ["unknown-name", "`Stricture` is not declared in `./structure.ts`"],
    ]);
  });
});

describe("code that targets could understand differently", () => {
  test("the same object twice in one call", () => {
    const used = "function mix(a: Inner, b: Inner): void { a.value = b.value; }\n\n";
    const refusals = refuse(FUNCTION, `${used}${FUNCTION}`);
    expect(refusals).toEqual([]);
    const text = specimenText();
    const original = text.get("specimen/specimen.ts") ?? "";
    text.set(
      "specimen/specimen.ts",
      original
        .replace(FUNCTION, `${used}${FUNCTION}`)
        .replace(BODY, `${BODY}  mix(state.inner, state.inner);\n`),
    );
    const aliased = compileProgram({ runtime: text, lowered: SPECIMEN }).refusals;
    expect(aliased.map(({ code }) => code)).toEqual(["same-object-twice"]);
  });
  test("a call with effects inside an expression", () => {
    const refusals = refuse(
      "output.count = busy ? counted : whole;",
      "output.count = busy ? counted : whole;\n  output.resultKpa = settle(state.inner, raw, 1) + 1;",
    );
    expect(refusals.map(({ code }) => code)).toEqual(["effect-in-expression"]);
  });
  test("an exchange field read twice in one step", () => {
    const refusals = refuse(
      "output.count = busy ? counted : whole;",
      "output.count = whole;\n  output.resultKpa = exchange.level;",
    );
    expect(refusals.map(({ code, message }) => [code, message])).toEqual([
      ["exchange-access", "`stepSlow` may read the exchange's `level` more than once in one step"],
    ]);
  });
  test("two fields that would print under one name", () => {
    const text = specimenText();
    const original = text.get("specimen/specimen.ts") ?? "";
    text.set(
      "specimen/specimen.ts",
      original
        .replace("  resultKpa: Real;", "  resultKpa: Real;\n  result_kpa: Real;")
        .replace("  output.count =", "  output.result_kpa = raw;\n  output.count ="),
    );
    const { refusals } = compileProgram({ runtime: text, lowered: SPECIMEN });
    expect(refusals.map(({ code, message }) => [code, message])).toEqual([
      ["duplicate-name", "`Output.result_kpa` would print like another field"],
    ]);
  });
  test("an array without a length", () => {
    const { arraySizes } = SPECIMEN;
    const { "State.history": _, ...others } = arraySizes;
    const { refusals } = compileProgram({
      runtime: specimenText(),
      lowered: { ...SPECIMEN, arraySizes: others },
    });
    expect(refusals.map(({ code, message }) => [code, message])).toEqual([
      ["missing-size", "the array `State.history` has no length"],
    ]);
  });
  test("an entry that the runtime lacks", () => {
    const entries = [...SPECIMEN.entries, { function: "stepOther", kind: "step", when: "Never." } as const];
    const { refusals } = compileProgram({ runtime: specimenText(), lowered: { ...SPECIMEN, entries } });
    expect(refusals.map(({ code }) => code)).toEqual(["missing-entry"]);
  });
});

test("one run reports every refusal", () => {
  const refusals = refuse(BODY, `${BODY}  const a = 3;\n  const b = level === 3;\n  while (true) {}\n`);
  expect(refusals.map(({ code }) => code)).toEqual(["untyped-literal", "real-equality", "unsupported-loop"]);
});
