import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { decodeSource } from "../../../spec/index.ts";

const bytes = (...parts: readonly (string | number)[]): Uint8Array =>
  Uint8Array.from(
    parts.flatMap((part) => (typeof part === "string" ? [...new TextEncoder().encode(part)] : [part])),
  );

describe("bytes to text", () => {
  test("any text survives, a byte order mark and all line ends included", () => {
    fc.assert(
      fc.property(fc.string({ unit: "grapheme" }), (text) => {
        expect(decodeSource("f", new TextEncoder().encode(text)).source?.text).toBe(text);
      }),
    );
    expect(decodeSource("f", bytes("\ufeffa\r\n")).source?.text).toBe("\ufeffa\r\n");
  });

  // Well-formed sequences: the Unicode Standard, table 3-7.
  test.each([
    ["a lone Latin-1 letter", bytes("a: 1\nname: K", 0xe4, "lte"), 2, 8],
    ["a continuation byte alone", bytes("ab", 0x80), 1, 3],
    ["an overlong slash", bytes(0xc0, 0xaf), 1, 1],
    ["a surrogate half", bytes("x", 0xed, 0xa0, 0x80), 1, 2],
    ["beyond the last code point", bytes("é", 0xf4, 0x90, 0x80, 0x80), 1, 2],
    ["a sequence cut off by the end", bytes("a\nb", 0xe2, 0x82), 2, 2],
    ["UTF-16 with its mark", bytes(0xff, 0xfe, "a", 0), 1, 1],
  ])("%s is refused at its place", (_, input, line, column) => {
    const { diagnostics } = decodeSource("f", input);
    expect(diagnostics[0]).toMatchObject({ code: "not-utf8", severity: "error", at: { line, column } });
  });

  test("one byte above two million is too much", () => {
    expect(decodeSource("f", new Uint8Array(2_000_000).fill(35)).source?.text.length).toBe(2_000_000);
    expect(decodeSource("f", new Uint8Array(2_000_001).fill(35)).diagnostics[0]?.code).toBe("file-too-large");
  });
});
