import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { hexFloat, isExactDecimal, shortestDecimal } from "../../../generator/print/numbers.ts";

/** Value of a C99 hexadecimal constant, by its definition in 6.4.4.2: digits times a power of two. */
const parsed = (text: string): number => {
  const parts = /^(-?)0x([01])(?:\.([0-9a-f]+))?p([+-]\d+)$/.exec(text);
  if (parts === null) throw new Error(`no hexadecimal constant: ${text}`);
  const [, sign, whole, digits = "", power] = parts;
  const mantissa = Number(BigInt(`0x${whole}${digits}`));
  const exponent = Number(power) - 4 * digits.length;
  // in two factors, since the smallest subnormal's power alone would underflow
  const half = Math.floor(exponent / 2);
  return (sign === "-" ? -1 : 1) * mantissa * 2 ** half * 2 ** (exponent - half);
};

describe("hexadecimal constants", () => {
  test("give every double back exactly", () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
        expect(parsed(hexFloat(value))).toBe(value);
      }),
      { numRuns: 5000 },
    );
  });
  test.each([
    [0.1, "0x1.999999999999ap-4"],
    [Math.fround(0.1), "0x1.99999ap-4"],
    [1, "0x1p+0"],
    [-0, "-0x0p+0"],
    [2 ** -1074, "0x0.0000000000001p-1022"],
    [2 ** -149, "0x1p-149"],
    [230000, "0x1.c138p+17"],
  ])("%d prints as %s", (value, text) => expect(hexFloat(value)).toBe(text));
});

describe("short decimals", () => {
  test("round back to the float they stand for", () => {
    fc.assert(
      fc.property(fc.float({ noNaN: true, noDefaultInfinity: true }), (value) => {
        expect(Math.fround(Number(shortestDecimal(value, "float32")))).toBe(value);
      }),
      { numRuns: 5000 },
    );
  });
  test("a decimal called exact is the value itself: at most six binary places", () => {
    fc.assert(
      fc.property(fc.float({ noNaN: true, noDefaultInfinity: true, min: -1e6, max: 1e6 }), (value) => {
        if (isExactDecimal(value)) {
          expect(BigInt(Math.round(value * 1e6))).toBe(BigInt(value * 64) * 15625n);
        }
      }),
    );
  });
});
