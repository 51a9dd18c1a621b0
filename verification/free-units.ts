import {
  absolutePressure,
  amount,
  convertQuantity,
  knownUnit,
  ratioUnit,
  readUnit,
  temperatureLevel,
  type UnitChoice,
} from "../spec/index.ts";
import type { BaseUnit } from "./fix-scenario.ts";

/** How the language reads a value of each base unit. */
export const UNIT_CHOICES: Readonly<Record<BaseUnit, UnitChoice>> = {
  s: amount("s"),
  rpm: amount("rpm"),
  "kPa abs": absolutePressure("kPa"),
  K: temperatureLevel,
  m: amount("m"),
  m2: amount("mm2", "m2"),
  ratio: ratioUnit(),
};

/** A value of a base unit as a number in the unit it was written in, for people: six significant digits. */
export function inWrittenUnit(value: number, base: BaseUnit, unit: string): number {
  return Number(convertTo(value, base, unit).toPrecision(6));
}

/**
 * A value as text with its unit that reads back to the same bits: in the unit it was written in if that is exact, else
 * in the base unit. `read` is the reader the text must satisfy.
 */
export function writtenExactly(
  value: number,
  base: BaseUnit,
  unit: string,
  read: (text: string) => number | undefined,
): string {
  const [named] = unit.split(" ");
  const number = Number(convertTo(value, base, unit).toPrecision(12));
  const suffix = base === "kPa abs" ? " abs" : "";
  const candidates = [
    `${number} ${named}${suffix}`.trim(),
    base === "ratio" ? `${value}` : `${value} ${base}`,
  ];
  return candidates.find((text) => Object.is(read(text), value)) ?? candidates[1];
}

const ZEROES: Readonly<Record<string, (kelvin: number) => number>> = {
  degC: (kelvin) => kelvin - 273.15,
  degF: (kelvin) => kelvin * 1.8 - 459.67,
};

function convertTo(value: number, base: BaseUnit, unit: string): number {
  const [named] = unit.split(" ");
  const onScale = ZEROES[named];
  if (base === "K" && onScale) return onScale(value);
  const from = knownUnit(base === "ratio" ? "" : base.split(" ")[0]);
  const to = readUnit(named);
  return to.ok ? convertQuantity(`${value}`, from, to.unit, "difference") : value;
}
