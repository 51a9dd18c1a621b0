import fc from "fast-check";
import { describe, expect, test } from "vitest";
import {
  convertExactly,
  convertQuantity,
  type LevelKind,
  sameDimension,
} from "../../../spec/quantities/convert.ts";
import { dimensionName } from "../../../spec/quantities/dimension-name.ts";
import { nearestDouble } from "../../../spec/quantities/rational.ts";
import { knownUnit, readUnit } from "../../../spec/quantities/unit-expression.ts";
import { NAMED_UNITS } from "../../../spec/units.ts";

const convert = (number: string, from: string, to: string, level: LevelKind = "difference"): number =>
  convertQuantity(number, knownUnit(from), knownUnit(to), level);

describe("conversion factors", () => {
  // Source: NIST SP 811 (2008), appendix B.8, from memory; the psi, inch and pound factors there are exact by definition.
  test.each([
    ["1", "psi", "Pa", 6894.757],
    ["1", "inHg", "Pa", 3386.389],
    ["1", "bar", "kPa", 100],
    ["1", "mbar", "Pa", 100],
    ["1", "rpm", "rad/s", 0.1047198],
    ["1", "kg/h", "kg/s", 2.777778e-4],
    ["1", "l", "m3", 0.001],
  ])("%s %s is %s %d to seven digits", (number, from, to, expected) => {
    expect(convert(number, from, to) / expected).toBeCloseTo(1, 6);
  });

  // Source: fixed points of the Celsius and Fahrenheit scales, exact by definition.
  test.each([
    ["0", "degC", 273.15],
    ["25", "degC", 298.15],
    ["100", "degC", 373.15],
    ["32", "degF", 273.15],
    ["212", "degF", 373.15],
    ["-40", "degF", 233.15],
    ["-40", "degC", 233.15],
  ])("a level of %s %s is %d K", (number, unit, kelvin) => {
    expect(convert(number, unit, "K", "temperature_level")).toBe(kelvin);
  });

  test("zero is never negative", () => {
    for (const [from, to] of [
      ["kPa", "kPa"],
      ["mm2", "m2"],
      ["psi", "Pa"],
    ])
      expect(Object.is(convert("-0", from, to), 0)).toBe(true);
  });

  test("a temperature difference has no offset", () => {
    expect(convert("9", "degF", "K")).toBe(5);
    expect(convert("4", "degC", "K")).toBe(4);
  });

  test("gauge pressure is against the standard atmosphere of 101325 Pa (ISO 2533)", () => {
    expect(convert("1", "bar", "Pa", "gauge_pressure")).toBe(201325);
    expect(convert("0", "kPa", "kPa", "gauge_pressure")).toBe(101.325);
  });

  test("a turn is 2 pi: rpm, krpm, Hz and rad/s agree with the double nearest the exact value", () => {
    expect(convert("60", "rpm", "rad/s")).toBe(2 * Math.PI);
    expect(convert("1", "Hz", "rpm")).toBe(60);
    expect(convert("165", "krpm", "rpm")).toBe(165000);
    expect(convert("1000", "rpm", "rad/s")).toBe(104.71975511965978); // Python fractions, 60 digits of pi
  });
});

describe("the same quantity in two units gives the same double", () => {
  test.each([
    ["0.0024", "m3", "2.4", "l"],
    ["0.0024", "m3", "2400", "cm3"],
    ["7.0e-4", "m2", "700", "mm2"],
    ["7.0e-4", "m2", "7", "cm2"],
    ["0.031", "m", "31", "mm"],
    ["43e6", "J/kg", "43", "MJ/kg"],
    ["3.4e-5", "kg*K^0.5/(s*Pa)", "34", "g*K^0.5/(s*kPa)"],
    ["0.3", "kg/s", "1080", "kg/h"],
  ])("%s %s and %s %s", (a, unitA, b, unitB) => {
    expect(convert(a, unitA, unitA)).toBe(convert(b, unitB, unitA));
  });

  test("for any decimal: shifting the point in the text instead of the unit changes nothing", () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 1, max: 10 ** 9 }),
        fc.integer({ min: -6, max: 3 }),
        (digits, exponent) => {
          const text = `${digits}e${exponent}`;
          expect(convert(text, "mm", "m")).toBe(Number(`${digits}e${exponent - 3}`));
          expect(convert(text, "mm2", "m2")).toBe(Number(`${digits}e${exponent - 6}`));
          expect(convert(text, "l", "m3")).toBe(Number(`${digits}e${exponent - 3}`));
          expect(convert(text, "%", "")).toBe(Number(`${digits}e${exponent - 2}`));
        },
      ),
    );
  });

  test("the short way of powers of ten gives what exact arithmetic gives, for every pair of units", () => {
    const pairs = NAMED_UNITS.flatMap((a) =>
      NAMED_UNITS.map((b) => [knownUnit(a.name), knownUnit(b.name)] as const),
    );
    const sameKind = pairs.filter(
      ([a, b]) => sameDimension(a, b) && a.scale === undefined && b.scale === undefined,
    );
    const text = fc.stringMatching(/^-?\d{1,12}(\.\d{1,6})?([eE][+-]?\d)?$/);
    fc.assert(
      fc.property(fc.constantFrom(...sameKind), text, ([from, to], number) => {
        const exact = nearestDouble(convertExactly(number, from, to, "difference"));
        expect(convertQuantity(number, from, to, "difference")).toBe(exact);
      }),
      { numRuns: 2000 },
    );
  });

  test("there and back is the same number for every pair of units of one dimension", () => {
    for (const a of NAMED_UNITS)
      for (const b of NAMED_UNITS) {
        const [from, to] = [knownUnit(a.name), knownUnit(b.name)];
        if (!sameDimension(from, to) || !sameDimension(to, from)) continue;
        const there = convertQuantity("7", from, to, "difference");
        expect(convertQuantity(String(there), to, from, "difference") / 7).toBeCloseTo(1, 12);
      }
  });
});

describe("the grammar of compounds", () => {
  test.each([
    ["1/kPa/s", "1/(kPa*s)"],
    ["mm2*s", "s*mm2"],
    ["mm2*s", "s*(mm*mm)"],
    ["1/s", "s^-1"],
    ["Pa2*s2/(kg2*K)", "(Pa*s/kg)^2/K"],
    ["kg*K^0.5/(s*Pa)", "kg/s/Pa*K^0.5"],
    ["N*m*s", "J*s"],
    ["W", "N*m/s"],
    ["m2", "m^2"],
    ["kg*m2", "N*m*s2"],
  ])("%s is %s", (a, b) => {
    expect(sameDimension(knownUnit(a), knownUnit(b))).toBe(true);
    expect(convert("3", a, b) * convert("3", b, a)).toBeCloseTo(9, 12);
  });

  test.each(["", "rad", "1/s", "K^0.5", "%", "Pa2*s2/(kg2*K)"])("`%s` is a unit", (text) => {
    expect(readUnit(text).ok).toBe(true);
  });

  test.each([
    ["parsec", "unknown"],
    ["kpa", "unknown"],
    ["kPa/", "malformed"],
    ["(kPa", "malformed"],
    ["kPa)", "malformed"],
    ["kPa kPa", "malformed"],
    ["*s", "malformed"],
    ["m^99", "malformed"],
    ["(K^0.5)^0.5", "malformed"],
    ["W/degC", "scale_in_compound"],
    ["degC2", "scale_in_compound"],
    ["m".repeat(200), "malformed"],
  ])("`%s` is refused as %s", (text, reason) => {
    expect(readUnit(text)).toMatchObject({ ok: false, failure: { reason } });
  });

  test("no text makes it throw", () => {
    const part = fc.constantFrom(
      "kPa",
      "s",
      "m",
      "K",
      "%",
      "1",
      "2",
      "^",
      "(",
      ")",
      "*",
      "/",
      "0.5",
      "-1",
      " ",
      "x",
      "°",
    );
    fc.assert(
      fc.property(fc.array(part, { maxLength: 30 }), (parts) => {
        expect(typeof readUnit(parts.join("")).ok).toBe("boolean");
      }),
      { numRuns: 3000 },
    );
  });
});

describe("dimensions that are easily mistaken", () => {
  const fits = (written: string, expected: string): boolean =>
    sameDimension(knownUnit(written), knownUnit(expected));

  test("a rotational speed must say what turns; a plain rate must not", () => {
    expect(fits("rad/s", "rpm")).toBe(true);
    expect(fits("1/s", "rpm")).toBe(false);
    expect(fits("Hz", "1/s")).toBe(false);
    expect(fits("rpm/s", "rpm/s")).toBe(true);
    expect(fits("1/s2", "rpm/s")).toBe(false);
  });

  test("inside other compounds the radian has no dimension", () => {
    expect(fits("N*m*s/rad", "N*m*s")).toBe(true);
    expect(fits("s/rad", "s/rad")).toBe(true);
    expect(fits("s", "s/rad")).toBe(true);
    expect(fits("s/rad", "s")).toBe(false);
  });

  test("a quantity is called by its name, or by its unit when it has none", () => {
    expect(dimensionName(knownUnit("bar"))).toBe("a pressure");
    expect(dimensionName(knownUnit("krpm"))).toBe("a rotational speed");
    expect(dimensionName(knownUnit("mm2*s/kPa"))).toBe("a quantity in mm2*s/kPa");
  });
});
