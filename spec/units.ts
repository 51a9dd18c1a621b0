import { decimal, multiply, ONE, power, type Rational, rational } from "./quantities/rational.ts";

/** One named unit. Everything the project knows about units is in this file; compounds: quantities/unit-expression.ts. */
export interface NamedUnit {
  readonly name: string;
  /** Powers of kg, m, s, K. */
  readonly powers: readonly [kg: number, m: number, s: number, K: number];
  /** To SI, exact; for units that count turns the factor 2 pi comes on top. */
  readonly factor: Rational;
  readonly countsTurns?: true;
  readonly countsRadians?: true;
  /** A temperature scale: kelvin = (value + offset) * factor. */
  readonly offset?: Rational;
  readonly means: string;
}

type Powers = NamedUnit["powers"];
const NONE: Powers = [0, 0, 0, 0];
const PRESSURE: Powers = [1, -1, -2, 0];
const RATE: Powers = [0, 0, -1, 0];
const ENERGY: Powers = [1, 2, -2, 0];

const unit = (name: string, powers: Powers, factor: Rational, means: string): NamedUnit => ({
  name,
  powers,
  factor,
  means,
});
const turns = (name: string, factor: Rational, means: string): NamedUnit => ({
  ...unit(name, RATE, factor, means),
  countsTurns: true,
});
const scale = (name: string, factor: Rational, offset: string, means: string): NamedUnit => ({
  ...unit(name, [0, 0, 0, 1], factor, means),
  offset: decimal(offset),
});

/** Pound-force over square inch: 0.45359237 kg * 9.80665 m/s2 / (0.0254 m)^2, all exact by definition. */
const PSI = multiply(multiply(decimal("0.45359237"), decimal("9.80665")), power(decimal("0.0254"), -2));
/** 25.4 conventional millimetres of mercury: density 13595.1 kg/m3, gravity 9.80665 m/s2 (ISO 80000-4 remark, from memory). */
const INCH_OF_MERCURY = multiply(multiply(decimal("13595.1"), decimal("9.80665")), decimal("0.0254"));

export const NAMED_UNITS: readonly NamedUnit[] = [
  unit("%", NONE, decimal("0.01"), "percent"),
  { ...unit("rad", NONE, ONE, "radian"), countsRadians: true },
  unit("Pa", PRESSURE, ONE, "pascal"),
  unit("kPa", PRESSURE, decimal("1000"), "kilopascal"),
  unit("bar", PRESSURE, decimal("100000"), "bar"),
  unit("mbar", PRESSURE, decimal("100"), "millibar"),
  unit("psi", PRESSURE, PSI, "pound-force per square inch"),
  unit("inHg", PRESSURE, INCH_OF_MERCURY, "inch of mercury"),
  turns("rpm", rational(1n, 60n), "revolutions per minute"),
  turns("krpm", rational(1000n, 60n), "thousand revolutions per minute"),
  turns("Hz", ONE, "revolutions per second"),
  unit("s", [0, 0, 1, 0], ONE, "second"),
  unit("ms", [0, 0, 1, 0], decimal("0.001"), "millisecond"),
  unit("us", [0, 0, 1, 0], decimal("0.000001"), "microsecond"),
  unit("h", [0, 0, 1, 0], decimal("3600"), "hour"),
  unit("K", [0, 0, 0, 1], ONE, "kelvin"),
  scale("degC", ONE, "273.15", "degree Celsius"),
  scale("degF", rational(5n, 9n), "459.67", "degree Fahrenheit"),
  unit("m", [0, 1, 0, 0], ONE, "metre"),
  unit("cm", [0, 1, 0, 0], decimal("0.01"), "centimetre"),
  unit("mm", [0, 1, 0, 0], decimal("0.001"), "millimetre"),
  unit("l", [0, 3, 0, 0], decimal("0.001"), "litre"),
  unit("kg", [1, 0, 0, 0], ONE, "kilogram"),
  unit("g", [1, 0, 0, 0], decimal("0.001"), "gram"),
  unit("N", [1, 1, -2, 0], ONE, "newton"),
  unit("J", ENERGY, ONE, "joule"),
  unit("kJ", ENERGY, decimal("1000"), "kilojoule"),
  unit("MJ", ENERGY, decimal("1000000"), "megajoule"),
  unit("W", [1, 2, -3, 0], ONE, "watt"),
  unit("kW", [1, 2, -3, 0], decimal("1000"), "kilowatt"),
];

/** Standard atmosphere (ISO 2533), Pa: what `gauge` is measured against in a plant file. */
export const STANDARD_ATMOSPHERE_PA = decimal("101325");

/** 2 pi to 60 digits (published constant): the one irrational factor, between turns and radians. */
export const TWO_PI = decimal("6.28318530717958647692528676655900576839433879875021164194989");

/** What a quantity is called, by a unit it is written in; a unit that is not here is named by its unit alone. */
export const DIMENSION_NAMES: readonly (readonly [unit: string, name: string])[] = [
  ["%", "a ratio"],
  ["kPa", "a pressure"],
  ["kPa/s", "a pressure rate"],
  ["rpm", "a rotational speed"],
  ["rpm/s", "a rotational acceleration"],
  ["s", "a time"],
  ["%/s", "a rate in 1/s"],
  ["K", "a temperature"],
  ["m", "a length"],
  ["mm2", "an area"],
  ["mm2/s", "an area rate"],
  ["l", "a volume"],
  ["m/s", "a speed"],
  ["kg/s", "a mass flow"],
  ["kg", "a mass"],
  ["N*m", "a torque or an energy"],
  ["kW", "a power"],
  ["kg*m2", "a moment of inertia"],
  ["J/kg", "an energy per mass"],
];
