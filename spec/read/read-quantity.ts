import { convertExactly, convertQuantity } from "../quantities/convert.ts";
import type { Duration, Quantity, Range } from "../quantity.ts";
import type { Free } from "../scenario-spec.ts";
import type { Span } from "../span.ts";
import type { Limits, UnitChoice } from "../table/kind.ts";
import type { Node, ScalarNode } from "../text/node.ts";
import { within } from "../text/positions.ts";
import { activeUnits, expectedOf } from "./active-units.ts";
import { checkLimits } from "./check-limits.ts";
import type { Context, Place } from "./context.ts";
import { type Match, matchUnit } from "./match-unit.ts";
import { checkPlain, isDecimal, isGrouped, refuseNumber } from "./number-text.ts";
import { refuseShape } from "./refuse-shape.ts";

interface Leaf {
  readonly units: readonly UnitChoice[];
  readonly limits: Limits;
}

/** Text with its own place: the whole of a scalar or a part of it. */
interface Piece {
  readonly text: string;
  readonly quoted: boolean;
  readonly at: Span;
}

export interface Amount extends Quantity {
  readonly number: string;
  readonly match: Match;
}

const NUMBER_AND_UNIT = /^([+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?)(?![\d.,_'])\s*(.*)$/s;

/** The line to paste follows the unit that is wanted under the words elsewhere. */
function withExample(place: Place, leaf: Leaf, context: Context): Place {
  const example = activeUnits(leaf.units, context)[0]?.example;
  if (example === undefined || !place.fix.endsWith(place.example)) return place;
  return { ...place, example, fix: `${place.fix.slice(0, -place.example.length)}${example}` };
}

/** A number with its unit, converted, or a report. */
export function readAmount(piece: Piece, leaf: Leaf, given: Place, context: Context): Amount | undefined {
  const place = withExample(given, leaf, context);
  const text = piece.text.trim().replace(/\s+/g, " ");
  const [, number, unitText] = NUMBER_AND_UNIT.exec(text) ?? [];
  if (number === undefined || !isDecimal(number) || isGrouped(text)) {
    refuseNumber(text, piece.at, expectedOf(leaf.units, context), place, context);
    return undefined;
  }
  if (unitText === "") checkPlain(number, piece, place, context);
  const unitAt =
    unitText === "" ? piece.at : within(piece.at, piece.text.lastIndexOf(unitText), unitText.length);
  const match = matchUnit(unitText, unitAt, leaf.units, place, context);
  if (match === undefined) return undefined;
  const value = convertQuantity(number, match.unit, match.choice.base, match.level);
  const amount: Amount = { value, written: text, at: piece.at, number, match };
  return checkLimits(amount, leaf.limits, place, context) ? amount : undefined;
}

function pieceOf(node: Node, expected: string, place: Place, context: Context): Piece | undefined {
  if (node.kind !== "scalar") {
    refuseShape(node, expected, place, context);
    return undefined;
  }
  return { text: node.text, quoted: node.quoted, at: textSpan(node) };
}

/** The span of a scalar's text, inside its quotes. */
function textSpan(node: ScalarNode): Span {
  if (!node.quoted || node.at.line !== node.at.endLine || node.at.endColumn - node.at.column < 3)
    return node.at;
  return { ...node.at, column: node.at.column + 1, endColumn: node.at.endColumn - 1 };
}

const plain = ({ value, written, at }: Amount): Quantity => ({ value, written, at });

export function readQuantity(node: Node, leaf: Leaf, place: Place, context: Context): Quantity | undefined {
  const piece = pieceOf(node, expectedOf(leaf.units, context), place, context);
  const amount = piece && readAmount(piece, leaf, place, context);
  return amount && plain(amount);
}

export function readDuration(node: Node, leaf: Leaf, place: Place, context: Context): Duration | undefined {
  const piece = pieceOf(node, "a time", place, context);
  const amount = piece && readAmount(piece, leaf, place, context);
  if (amount === undefined) return undefined;
  const { unit, choice, level } = amount.match;
  return { ...plain(amount), ...convertExactly(amount.number, unit, choice.base, level) };
}

/** Splits `a to b` or `between a and b`, keeping the places of both. */
function split(piece: Piece, pattern: RegExp): readonly [Piece, Piece] | undefined {
  const match = pattern.exec(piece.text);
  if (match === null) return undefined;
  const [, low, high] = match;
  const lowAt = match[0].indexOf(low, match[0].startsWith("between") ? 7 : 0);
  const highAt = piece.text.lastIndexOf(high);
  return [
    { text: low, quoted: piece.quoted, at: within(piece.at, lowAt, low.length) },
    { text: high, quoted: piece.quoted, at: within(piece.at, highAt, high.length) },
  ];
}

const RANGE = /^(\S.*?)\s+to\s+(\S.*)$/s;
const BETWEEN = /^between\s+(\S.*?)\s+and\s+(\S.*)$/s;

export function readRange(node: Node, leaf: Leaf, place: Place, context: Context): Range | undefined {
  const piece = pieceOf(node, "a range", place, context);
  if (piece === undefined) return undefined;
  const halves = split(piece, RANGE);
  if (halves === undefined) {
    context.report({
      code: "not-a-range",
      at: piece.at,
      message: `${place.name} needs a range`,
      label: "expected `low to high`",
      fix: place.fix,
    });
    return undefined;
  }
  const [low, high] = halves.map((half) => readAmount(half, leaf, place, context));
  if (low === undefined || high === undefined) return undefined;
  if (Math.fround(low.value) < Math.fround(high.value)) return { low: plain(low), high: plain(high) };
  refuseOrder(low, high, "must rise from low to high", piece.at, withExample(place, leaf, context), context);
  return undefined;
}

function refuseOrder(
  low: Amount,
  high: Amount,
  rule: string,
  at: Span,
  place: Place,
  context: Context,
): void {
  context.report({
    code: "wrong-order",
    at,
    message: `${place.name} ${rule}, got ${low.written} and ${high.written}`,
    label: `${low.written} is not below ${high.written}`,
    fix: place.fix,
  });
}

export function readFree(node: Node, leaf: Leaf, place: Place, context: Context): Free | undefined {
  const piece = pieceOf(node, expectedOf(leaf.units, context), place, context);
  if (piece === undefined) return undefined;
  const halves = split(piece, BETWEEN) ?? [piece, piece];
  const low = readAmount(halves[0], leaf, place, context);
  const high = halves[0] === halves[1] ? low : readAmount(halves[1], leaf, place, context);
  if (low === undefined || high === undefined) return undefined;
  if (low.value <= high.value)
    return { low: low.value, high: high.value, unit: low.match.text, at: piece.at };
  refuseOrder(low, high, "must run from the lower to the higher value", piece.at, place, context);
  return undefined;
}
