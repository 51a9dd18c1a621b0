import type { Axes } from "../table/kind.ts";
import { entryOf, type MapNode, type Node } from "../text/node.ts";
import { startOf } from "../text/positions.ts";
import type { Context, Place } from "./context.ts";
import { readNumbers, readUnitKey } from "./read-numbers.ts";
import { refuseShape } from "./refuse-shape.ts";
import { nearestName, orList, quote } from "./suggest.ts";

export interface Axis {
  readonly over: string;
  readonly points: readonly number[];
  readonly unit: string;
  readonly node: Node;
}

const exampleOf = (name: string, axes: Axes): string => {
  const { shown, example = "[0, 50, 100]" } = axes[name];
  return shown === "" ? `{ ${name}: ${example} }` : `{ ${name}: ${example}, unit: "${shown}" }`;
};

/** `{ engine_speed: [1500, 2500], unit: rpm }`: what the axis is, and its points, strictly increasing. */
export function readAxis(
  node: Node | undefined,
  axes: Axes,
  place: Place,
  context: Context,
): Axis | undefined {
  const names = Object.keys(axes);
  const axisPlace = {
    ...place,
    example: exampleOf(names[0], axes),
    fix: `${place.fix}: ${exampleOf(names[0], axes)}`,
  };
  if (node === undefined) return undefined;
  if (node.kind !== "map") return refuseShape(node, "a map with an axis and its unit", axisPlace, context);
  const entry = node.entries.find(({ key }) => Object.hasOwn(axes, key));
  refuseOthers(node, names, entry === undefined, axisPlace, context);
  if (entry === undefined) return undefined;
  const own = { ...axisPlace, name: `\`${entry.key}\``, example: exampleOf(entry.key, axes) };
  const match = readUnitKey(node, [axes[entry.key]], own, context);
  const points = readNumbers(entry.value, match, {}, own, context);
  if (match === undefined || points === undefined || !isRising(points, entry.value, own, context))
    return undefined;
  return { over: entry.key, points, unit: match.text, node: entry.value };
}

function refuseOthers(
  node: MapNode,
  names: readonly string[],
  none: boolean,
  place: Place,
  context: Context,
): void {
  const known = [...names, "unit"];
  const others = node.entries.filter(({ key }) => key !== "unit" && !(names.includes(key) && !none));
  const extra = none ? others : others.filter(({ key }) => !known.includes(key));
  for (const { key, keyAt } of extra) {
    const near = nearestName(key, known);
    context.report({
      code: "unknown-axis",
      at: keyAt,
      message: `${quote(key)} is not an axis of ${place.name}`,
      label: near === undefined ? `expected ${orList(names)}` : `did you mean \`${near}\`?`,
      fix: place.fix,
    });
  }
  if (none && extra.length === 0)
    context.report({
      code: "missing-key",
      at: node.at,
      message: `${place.name} does not say what it is over`,
      label: `expected ${orList(names)}`,
      fix: place.fix,
    });
  const axesGiven = node.entries.filter(({ key }) => names.includes(key));
  if (axesGiven.length > 1)
    context.report({
      code: "unknown-axis",
      at: axesGiven[1].keyAt,
      message: `${place.name} has a second axis ${quote(axesGiven[1].key)}`,
      because: [{ at: axesGiven[0].keyAt, message: "the first one" }],
      fix: place.fix,
    });
}

/** True when every value is above the one before it, also as a float32. */
export function isRising(values: readonly number[], node: Node, place: Place, context: Context): boolean {
  const bad = values.findIndex((value, i) => i > 0 && Math.fround(value) <= Math.fround(values[i - 1]));
  if (bad === -1) return true;
  const items = node.kind === "list" ? node.items : [];
  const text = (i: number): string => (items[i]?.kind === "scalar" ? items[i].text : String(values[i]));
  context.report({
    code: "not-increasing",
    at: items[bad]?.at ?? node.at,
    message: `${place.name} must rise from value to value, but ${text(bad)} follows ${text(bad - 1)}`,
    label: `must be above ${text(bad - 1)}`,
    fix: "sort the values, and the table's rows or columns with them",
  });
  return false;
}

/** Unknown keys of a curve or table, which is not a block of its own. */
export function refuseKeys(node: MapNode, known: readonly string[], place: Place, context: Context): void {
  for (const { key, keyAt } of node.entries) {
    if (known.includes(key)) continue;
    const near = nearestName(key, known);
    context.report({
      code: "unknown-key",
      at: keyAt,
      message: `${place.name} has no key ${quote(key)}`,
      label: near === undefined ? `known keys: ${orList(known)}` : `did you mean \`${near}\`?`,
      fix: place.fix,
    });
  }
  for (const key of known)
    if (key !== "unit" && entryOf(node, key) === undefined)
      context.report({
        code: "missing-key",
        at: startOf(node.at),
        message: `${place.name} has no \`${key}\``,
        fix: place.fix,
      });
}
