import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { decimals, figure, margin, percentUp, whole } from "../../../verification/report/numbers.ts";

const toNumber = (text: string): number =>
  Number(text.replace("\u2212", "-").replaceAll("\u202F", "").replace("%", ""));

describe("numbers", () => {
  test("what is no number prints as words", () => {
    for (const print of [whole, figure, margin, percentUp, (value: number) => decimals(value, 2)]) {
      expect(print(Number.NaN)).toBe("not a number");
      expect(print(Infinity)).toBe("infinite");
      expect(print(-Infinity)).toBe("minus infinite");
      expect(print(null as unknown as number)).toBe("not known");
    }
  });

  test("a margin is never shown larger than it is, and by less than a thousandth smaller", () => {
    fc.assert(
      fc.property(fc.double({ min: -50, max: 50, noNaN: true }), (value) => {
        const shown = toNumber(margin(value));
        expect(shown).toBeLessThanOrEqual(value + 1e-9);
        expect(shown).toBeGreaterThan(value - 0.0011);
      }),
      { seed: 20_612 },
    );
  });

  test("the slightest violation does not look like the edge", () => {
    expect(margin(-1e-5)).toBe("\u22120.001");
    expect(margin(0)).toBe("0.000");
    expect(margin(-0)).toBe("0.000");
    expect(margin(0.0009)).toBe("0.000");
  });

  test("a bound is never shown smaller than it is, and by less than a tenth larger", () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-9, max: 1, noNaN: true }), (probability) => {
        const shown = toNumber(percentUp(probability)) / 100;
        expect(shown).toBeGreaterThanOrEqual(probability * (1 - 1e-9));
        expect(shown).toBeLessThanOrEqual(Math.min(probability * 1.1 + 1e-12, 1));
      }),
      { seed: 20_613 },
    );
  });

  // Bound for no violation in n runs: 1 - 0.05^(1/n) (Clopper and Pearson 1934, from memory).
  test("the bound of 1000 clean runs reads 0.30 %", () => {
    expect(percentUp(1 - 0.05 ** (1 / 1000))).toBe("0.30\u202F%");
    expect(percentUp(1)).toBe("100\u202F%");
    expect(percentUp(0)).toBe("0\u202F%");
    expect(percentUp(0.1234)).toBe("13\u202F%");
  });

  test("thousands stand apart from five digits on", () => {
    expect(whole(1234)).toBe("1234");
    expect(whole(165_000)).toBe("165\u202F000");
    expect(whole(-1_234_567)).toBe("\u22121\u202F234\u202F567");
    expect(figure(0.000123456)).toBe("0.0001235");
    expect(figure(101_325.04, 6)).toBe("101\u202F325");
    expect(figure(2.5e-9)).toBe("2.5e-9");
  });
});
