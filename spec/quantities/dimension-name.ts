import { DIMENSION_NAMES } from "../units.ts";
import { sameDimension } from "./convert.ts";
import { knownUnit, type Unit } from "./unit-expression.ts";

const NAMES = DIMENSION_NAMES.map(([text, name]) => ({ unit: knownUnit(text), name }));

/** What a quantity in this unit is called, with article: `a pressure`, `a quantity in mm2*s`. */
export function dimensionName(unit: Unit): string {
  const found = NAMES.find((each) => sameDimension(unit, each.unit) && sameDimension(each.unit, unit));
  return found?.name ?? `a quantity in ${unit.text}`;
}
