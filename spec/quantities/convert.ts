import { STANDARD_ATMOSPHERE_PA, TWO_PI } from "../units.ts";
import {
  add,
  decimal,
  divide,
  multiply,
  nearestDouble,
  power,
  type Rational,
  squareRoot,
} from "./rational.ts";
import type { Unit } from "./unit-expression.ts";

export type LevelKind = "difference" | "temperature_level" | "absolute_pressure" | "gauge_pressure";

const samePowers = (a: Unit, b: Unit): boolean =>
  a.doubledPowers.every((each, i) => each === b.doubledPowers[i]);

/** Only a power of time: where a turn and a plain 1/s would be mistaken for each other. */
const isPureRate = (unit: Unit): boolean => {
  const [kg, m, s, K] = unit.doubledPowers;
  return kg === 0 && m === 0 && K === 0 && s !== 0;
};

/**
 * True when a value in `written` can stand where `expected` is wanted. The radian has no dimension, but a
 * rotational speed must say rpm, Hz or rad/s, and a plain rate or time must not.
 */
export function sameDimension(written: Unit, expected: Unit): boolean {
  if (!samePowers(written, expected)) return false;
  if (!isPureRate(expected)) return true;
  if (!expected.angular) return !written.angular;
  return written.angular || expected.doubledPowers[2] > 0;
}

/** Exact factor from `from` to `to`; two irrational sources (pi, odd half powers) to more than 60 digits. */
function factorBetween(from: Unit, to: Unit): Rational {
  const plain = squareRoot(divide(from.squaredFactor, to.squaredFactor));
  const doubledTurns = from.doubledTurns - to.doubledTurns;
  return doubledTurns === 0 ? plain : multiply(plain, squareRoot(power(TWO_PI, doubledTurns)));
}

function onScale(value: Rational, unit: Unit): Rational {
  return unit.scale === undefined ? value : multiply(add(value, unit.scale.offset), unit.scale.factor);
}

/** The exact value of `text` (a decimal) in the unit `to` (K for a temperature level); dimensions must agree. */
export function convertExactly(text: string, from: Unit, to: Unit, level: LevelKind): Rational {
  const value = decimal(text);
  if (level === "temperature_level") return onScale(value, from);
  const scaled = multiply(value, factorBetween(from, to));
  if (level !== "gauge_pressure") return scaled;
  return add(scaled, divide(STANDARD_ATMOSPHERE_PA, squareRoot(to.squaredFactor)));
}

/** k when x is 10^k. */
function decimalShift({ numerator, denominator }: Rational): number | undefined {
  if (numerator !== 1n && denominator !== 1n) return undefined;
  const digits = String(numerator * denominator);
  if (!/^10*$/.test(digits)) return undefined;
  return denominator === 1n ? digits.length - 1 : 1 - digits.length;
}

/** The number times 10^shift by its text alone: the engine reads decimals correctly rounded. */
function shifted(text: string, shift: number): number {
  const [mantissa, exponent = "0"] = text.toLowerCase().split("e");
  return Number(`${mantissa}e${Number(exponent) + shift}`);
}

/** Converts decimals as `convertExactly` does, rounded once to the nearest double; zero is never negative. */
export function converter(from: Unit, to: Unit, level: LevelKind): (text: string) => number {
  const convert = signedConverter(from, to, level);
  return (text) => convert(text) + 0;
}

/** Powers of ten take the short way. */
function signedConverter(from: Unit, to: Unit, level: LevelKind): (text: string) => number {
  const scales = from.scale !== undefined && level === "temperature_level";
  if (scales || level === "gauge_pressure")
    return (text) => nearestDouble(convertExactly(text, from, to, level));
  if (from.text === to.text) return Number;
  const factor = factorBetween(from, to);
  const shift = decimalShift(factor);
  if (shift !== undefined) return (text) => shifted(text, shift);
  return (text) => nearestDouble(multiply(decimal(text), factor));
}

export const convertQuantity = (text: string, from: Unit, to: Unit, level: LevelKind): number =>
  converter(from, to, level)(text);
