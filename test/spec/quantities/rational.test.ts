import fc from "fast-check";
import { expect, test } from "vitest";
import {
  decimal,
  divide,
  multiply,
  nearestDouble,
  power,
  rational,
  squareRoot,
} from "../../../spec/quantities/rational.ts";

// The engine's own conversion of decimal text to a double is correctly rounded (ECMA-262, StringToNumber): the reference here.

test("a decimal text and the nearest double of its exact value agree with the engine's own reading", () => {
  const digits = fc.stringMatching(/^-?\d{1,25}(\.\d{0,25})?(e-?\d{1,2})?$/);
  fc.assert(
    fc.property(digits, (text) => {
      const mine = nearestDouble(decimal(text));
      expect(Object.is(mine, Number(text)) || (mine === 0 && Number(text) === 0)).toBe(true);
    }),
    { numRuns: 2000 },
  );
});

test("every double survives: its exact value rounds to itself, subnormals included", () => {
  fc.assert(
    fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
      const text = value.toString();
      expect(nearestDouble(decimal(text)) + 0).toBe(value + 0);
    }),
    { numRuns: 2000 },
  );
});

test("ties go to even, as IEEE 754 rounds", () => {
  const two53 = 2n ** 53n;
  expect(nearestDouble(rational(two53 + 1n))).toBe(2 ** 53);
  expect(nearestDouble(rational(two53 + 3n))).toBe(2 ** 53 + 4);
  expect(nearestDouble(rational(2n * two53 + 2n, 2n))).toBe(2 ** 53);
  expect(nearestDouble(rational(2n * two53 + 2n * 1n + 1n, 2n))).toBe(2 ** 53 + 2);
});

test("the smallest subnormal, half of it, and overflow", () => {
  expect(nearestDouble(decimal("4.9406564584124654e-324"))).toBe(Number.MIN_VALUE);
  expect(nearestDouble(power(rational(1n, 2n), 1075))).toBe(0);
  expect(nearestDouble(multiply(power(rational(1n, 2n), 1075), rational(3n, 2n)))).toBe(Number.MIN_VALUE);
  expect(nearestDouble(decimal("2e308"))).toBe(Number.POSITIVE_INFINITY);
});

test("the root of a square of fractions is exact, other roots square back to 70 digits", () => {
  fc.assert(
    fc.property(fc.bigInt(1n, 10n ** 12n), fc.bigInt(1n, 10n ** 12n), (top, bottom) => {
      const value = rational(top, bottom);
      expect(squareRoot(multiply(value, value))).toEqual(value);
      const root = squareRoot(value);
      const ratio = divide(multiply(root, root), value);
      const off = divide(rational(ratio.numerator - ratio.denominator, ratio.denominator), rational(1n));
      expect(Math.abs(nearestDouble(off))).toBeLessThan(1e-55);
    }),
  );
});
