import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type Diagnostic, diagnosticsJson, renderDiagnostics } from "../../../spec/index.ts";

const at = (line: number, column: number) => ({
  file: "loop.yaml",
  line,
  column,
  endLine: line,
  endColumn: column + 2,
});
const SOURCE = { file: "loop.yaml", text: "a: 1\n      rise_limit: 40 kPa\n  opening: 0 % to 95 %\n" };
const FINDING: Diagnostic = {
  code: "wrong-unit",
  severity: "error",
  at: at(2, 19),
  message: "`rise_limit` needs a rate, got a pressure",
  label: "a pressure; expected % per second",
  because: [{ at: at(3, 3), message: "this block limits the opening" }],
  fix: "rise_limit: 40 %/s",
};
const PLAIN = { colour: false, width: 80 };

describe("diagnostics for people", () => {
  test("place first, then severity, sentence and code; the line with a caret; the other place; the fix; a count", () => {
    expect(renderDiagnostics([FINDING], [SOURCE], { ...PLAIN, consequence: "nothing was written" })).toBe(
      `loop.yaml:2:19: error: \`rise_limit\` needs a rate, got a pressure (wrong-unit)
      rise_limit: 40 kPa
                  ^ a pressure; expected % per second
  because loop.yaml:3:3: this block limits the opening
  fix: rise_limit: 40 %/s

1 error in 1 file; nothing was written. \`spoolwright explain wrong-unit\` says more.
`,
    );
  });

  test("colour adds escape codes and nothing else", () => {
    const coloured = renderDiagnostics([FINDING], [SOURCE], { ...PLAIN, colour: true });
    expect(coloured).toContain("\u001b[31m");
    const escapes = new RegExp(`${String.fromCharCode(27)}\\[\\d+m`, "g");
    expect(coloured.replace(escapes, "")).toBe(renderDiagnostics([FINDING], [SOURCE], PLAIN));
  });

  test("warnings alone stop nothing", () => {
    const warning: Diagnostic = { ...FINDING, severity: "warning" };
    const text = renderDiagnostics([warning, warning], [SOURCE], {
      ...PLAIN,
      consequence: "nothing was written",
    });
    expect(text).toContain("2 warnings in 1 file. `spoolwright");
  });

  test("no finding, no text", () => {
    expect(renderDiagnostics([], [], PLAIN)).toBe("");
  });

  test("a stranger's control characters never reach the terminal", () => {
    const text = `${"x".repeat(5)}\u001b[2J\u0007\u202e: 1\n`;
    const finding = {
      ...FINDING,
      at: at(1, 7),
      message: "got `\u001b[2J`",
      because: [],
      fix: "\u001b]0;t\u0007",
    };
    const rendered = renderDiagnostics([finding], [{ file: "loop.yaml", text }], PLAIN);
    expect([...rendered].filter((character) => character < " " && character !== "\n")).toEqual([]);
    expect(rendered).not.toContain("\u202e");
  });

  test("the source line and the caret stay within the width, and the caret under its character", () => {
    const numbers = fc.record({
      length: fc.integer({ min: 1, max: 600 }),
      width: fc.integer({ min: 40, max: 160 }),
    });
    fc.assert(
      fc.property(numbers, fc.double({ min: 0, max: 0.999, noNaN: true }), ({ length, width }, share) => {
        const column = Math.floor(share * length) + 1;
        const line = `${"-".repeat(column - 1)}X${"-".repeat(length - column)}`;
        const finding = { ...FINDING, label: "", because: [], at: at(1, column) };
        const [, shown, caret] = renderDiagnostics([finding], [{ file: "loop.yaml", text: line }], {
          colour: false,
          width,
        }).split(/\n(?! {4}\S)/);
        expect(shown.length).toBeLessThanOrEqual(width);
        expect(shown[caret.indexOf("^")]).toBe("X");
      }),
    );
  });
});

test("diagnostics for programs have the documented fields", () => {
  expect(diagnosticsJson([FINDING])).toEqual({
    ok: false,
    diagnostics: [
      {
        code: "wrong-unit",
        severity: "error",
        file: "loop.yaml",
        line: 2,
        column: 19,
        endLine: 2,
        endColumn: 21,
        message: FINDING.message,
        label: FINDING.label,
        because: [
          {
            file: "loop.yaml",
            line: 3,
            column: 3,
            endLine: 3,
            endColumn: 5,
            message: "this block limits the opening",
          },
        ],
        fix: "rise_limit: 40 %/s",
      },
    ],
  });
  expect(diagnosticsJson([]).ok).toBe(true);
  expect(diagnosticsJson([{ ...FINDING, severity: "hint" }]).ok).toBe(true);
});
