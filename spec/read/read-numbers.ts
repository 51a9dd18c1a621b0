import { converter } from "../quantities/convert.ts";
import type { Limits, UnitChoice } from "../table/kind.ts";
import { entryOf, type MapNode, type Node } from "../text/node.ts";
import { startOf } from "../text/positions.ts";
import { activeUnits } from "./active-units.ts";
import { checkLimits } from "./check-limits.ts";
import type { Context, Place } from "./context.ts";
import { type Match, matchUnit } from "./match-unit.ts";
import { isDecimal, refuseNumber } from "./number-text.ts";
import { refuseShape } from "./refuse-shape.ts";

/** Largest table or curve: 64 by 64 is beyond any map in use and bounds the generated code. */
export const LONGEST_LIST = 64;

/** The `unit:` beside a list; none means plain numbers. */
export function readUnitKey(
  block: MapNode,
  units: readonly UnitChoice[],
  place: Place,
  context: Context,
): Match | undefined {
  const entry = entryOf(block, "unit");
  const own = { ...place, fix: `unit: "${activeUnits(units, context)[0]?.shown ?? ""}"` };
  if (entry === undefined) return matchUnit("", startOf(block.at), units, own, context);
  if (entry.value.kind !== "scalar") return refuseShape(entry.value, "a unit", own, context);
  return matchUnit(entry.value.text.trim(), entry.value.at, units, own, context);
}

/** A list of bare numbers in one unit; undefined when any of them is wrong (each is reported). */
export function readNumbers(
  node: Node | undefined,
  match: Match | undefined,
  limits: Limits,
  place: Place,
  context: Context,
): readonly number[] | undefined {
  if (node === undefined) return undefined;
  if (node.kind !== "list" || node.items.length === 0)
    return refuseShape(node, "a list of numbers", place, context);
  if (node.items.length > LONGEST_LIST) {
    context.report({
      code: "list-too-long",
      at: node.at,
      message: `${place.name} has ${node.items.length} values; the limit is ${LONGEST_LIST}`,
      fix: place.fix,
    });
    return undefined;
  }
  const convert = match && converter(match.unit, match.choice.base, match.level);
  const values = node.items.map((item, i) =>
    readNumber(item, match, convert, limits, nth(i, place), context),
  );
  return values.every((value) => value !== undefined) ? (values as number[]) : undefined;
}

export const nth = (index: number, place: Place): Place => ({
  ...place,
  name: `value ${index + 1} of ${place.name}`,
  fix: "",
});

function readNumber(
  node: Node,
  match: Match | undefined,
  convert: ((text: string) => number) | undefined,
  limits: Limits,
  place: Place,
  context: Context,
): number | undefined {
  if (node.kind !== "scalar") return refuseShape(node, "a number", place, context);
  const text = node.text.trim();
  if (!isDecimal(text)) {
    refuseListed(text, node, place, context);
    return undefined;
  }
  if (match === undefined || convert === undefined) return undefined;
  const value = convert(text);
  const amount = { value, written: `${text} ${match.text}`.trim(), at: node.at, number: text, match };
  return checkLimits(amount, limits, place, context) ? value : undefined;
}

function refuseListed(text: string, node: Node, place: Place, context: Context): void {
  const [, number, unit] = /^([+-]?[\d.]+(?:e[+-]?\d+)?)\s*([A-Za-z%].*)$/i.exec(text) ?? [];
  if (number === undefined || !isDecimal(number)) refuseNumber(text, node.at, "a number", place, context);
  else
    context.report({
      code: "unit-in-list",
      at: node.at,
      message: `${place.name} carries the unit \`${unit}\`; a list has one unit, beside it`,
      label: `write ${number} and \`unit: "${unit}"\``,
      fix: place.fix,
    });
}
