import type { Quantity } from "../quantity.ts";
import type { IntegerKind } from "../table/kind.ts";
import type { Node } from "../text/node.ts";
import type { Context, Place } from "./context.ts";
import { refuseNumber } from "./number-text.ts";
import { refuseShape } from "./refuse-shape.ts";

export function readInteger(
  node: Node,
  kind: IntegerKind,
  place: Place,
  context: Context,
): Quantity | undefined {
  const only = kind.least === kind.most;
  const expected = only ? `the number ${kind.least}` : `a whole number from ${kind.least} to ${kind.most}`;
  if (node.kind !== "scalar") return refuseShape(node, expected, place, context);
  if (!/^[+-]?\d{1,9}$/.test(node.text)) {
    refuseNumber(node.text, node.at, expected, place, context);
    return undefined;
  }
  const value = Number(node.text);
  if (value >= kind.least && value <= kind.most) return { value, written: node.text, at: node.at };
  context.report({
    code: "outside-limits",
    at: node.at,
    message: `${place.name} must be ${expected}, got ${node.text}`,
    label: only ? `expected ${kind.least}` : `${kind.least} to ${kind.most}; typical: ${place.example}`,
    fix: place.fix,
  });
  return undefined;
}
