import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { blockComment, commentLines, commentText } from "../../../generator/print/comment-text.ts";

// C99 5.1.1.2 (phases of translation), 5.2.1.1 (trigraphs), 6.4.9 (comments).
const nasty = fc.oneof(
  fc.string({ unit: "binary", maxLength: 60 }),
  fc
    .array(
      fc.constantFrom("*/", "/*", "??/", "??", "\\", "\n", "\\\n", "//", "*", "/", "?", "\u2028", "é", "%"),
      { maxLength: 12 },
    )
    .map((parts) => parts.join("")),
);

describe("text on its way into a comment", () => {
  test("cannot end the comment, open another, form a trigraph or continue a line", () => {
    fc.assert(
      fc.property(nasty, (text) => {
        const clean = commentText(text);
        expect(clean).not.toMatch(/\*\/|\/\*|\/\/|\?\?|\\/);
        expect(clean).toMatch(/^[\x20-\x7e]*$/);
      }),
      { numRuns: 2000 },
    );
  });
  test("a block comment ends where it should, whatever stands in it", () => {
    fc.assert(
      fc.property(fc.array(nasty, { maxLength: 4 }), (texts) => {
        const comment = blockComment(texts, "    ").join("\n");
        if (comment !== "") {
          expect(comment.indexOf("*/")).toBe(comment.length - 2);
          expect(comment.lastIndexOf("/*")).toBe(4);
        }
      }),
      { numRuns: 1000 },
    );
  });
  test("very long text is cut", () => {
    expect(commentText("x".repeat(100_000)).length).toBeLessThanOrEqual(400);
  });
  test("signs that engineers write keep their meaning", () => {
    expect(commentText("25 °C ± 2, ≤ 3 m²")).toBe("25 deg C +- 2, <= 3 m2");
  });
});

describe("lines of a comment", () => {
  test("running text is joined and wrapped, equations keep their own lines", () => {
    const lines = commentLines(
      ["First-order filter that is", "described here.", "  y = x + 1", "source: somewhere"],
      40,
    );
    expect(lines).toEqual([
      "First-order filter that is described",
      "here.",
      "  y = x + 1",
      "source: somewhere",
    ]);
  });
});
