import type { BlockKind, Kind, Shapes, TupleKind, VariantsKind } from "../table/kind.ts";
import { entryOf, isEmpty, type Node } from "../text/node.ts";
import { startOf } from "../text/positions.ts";
import { checkKeys } from "./check-keys.ts";
import { type Context, type Place, placeOfKey } from "./context.ts";
import { readBlock, readKeys } from "./read-block.ts";
import { readCurve } from "./read-curve.ts";
import { readInteger } from "./read-integer.ts";
import { nth } from "./read-numbers.ts";
import { readDuration, readFree, readQuantity, readRange } from "./read-quantity.ts";
import { readTable } from "./read-table.ts";
import { isIdentifier, readFlag, readText, readWord } from "./read-text.ts";
import { refuseShape } from "./refuse-shape.ts";
import { counted, orList, quote, shownName } from "./suggest.ts";

/** Reads a node as its kind says: the value, with holes where something was reported, or undefined. */
export function readKind(node: Node, kind: Kind, place: Place, name: string, context: Context): unknown {
  switch (kind.kind) {
    case "quantity":
      return readQuantity(node, kind, place, context);
    case "duration":
      return readDuration(node, kind, place, context);
    case "range":
      return readRange(node, kind, place, context);
    case "free":
      return readFree(node, kind, place, context);
    case "tuple":
      return readTuple(node, kind, place, context);
    case "word":
      return readWord(node, kind.words, place, context);
    case "text":
      return readText(node, kind, place, context);
    case "reference":
      return node.kind === "scalar" && !isEmpty(node)
        ? { name: node.text, at: node.at }
        : refuseShape(node, "a name", place, context);
    case "flag":
      return readFlag(node, place, context);
    case "integer":
      return readInteger(node, kind, place, context);
    case "curve":
      return readCurve(node, kind, place, context);
    case "table":
      return readTable(node, kind, place, context);
    case "block":
      return readBlock(node, kind, name, context);
    case "list":
      return readList(node, kind.of, place, name, context);
    case "map":
      return readMap(node, kind.of, place, context);
    case "variants":
      return readVariants(node, kind, name, context);
    case "shape":
      return readShape(node, kind.shapes, place, name, context);
  }
}

function readTuple(node: Node, kind: TupleKind, place: Place, context: Context): unknown {
  const wanted = kind.elements.length;
  if (node.kind !== "list") return refuseShape(node, `a list of ${wanted} values`, place, context);
  if (node.items.length !== wanted) {
    context.report({
      code: "wrong-table-size",
      at: node.at,
      message: `${place.name} has ${counted(node.items.length, "value")}`,
      label: `expected ${wanted} values`,
      fix: place.fix,
    });
    return undefined;
  }
  const values = node.items.map((item, i) => readQuantity(item, kind.elements[i], nth(i, place), context));
  return values.every((value) => value !== undefined) ? values : undefined;
}

function readList(node: Node, of: Kind, place: Place, name: string, context: Context): unknown {
  if (node.kind !== "list") return refuseShape(node, "a list", place, context);
  return node.items.map((item, i) => readKind(item, of, nth(i, place), `item ${i + 1} of ${name}`, context));
}

function readMap(node: Node, of: Kind, place: Place, context: Context): unknown {
  if (node.kind !== "map") return refuseShape(node, "a map of names", place, context);
  return node.entries.map(({ key, keyAt, value }) => {
    if (!isIdentifier(key))
      context.report({
        code: "bad-name",
        at: keyAt,
        message: `${quote(key)} cannot be a name`,
        label: "a small letter, then small letters, digits or _, 40 at most, no word of C or TypeScript",
      });
    return {
      name: key,
      nameAt: keyAt,
      value: readKind(value, of, placeOfKey(key, place.example), key, context),
    };
  });
}

function readVariants(node: Node, kind: VariantsKind, name: string, context: Context): unknown {
  const tags = Object.keys(kind.variants);
  const fix = `${name}: { ${kind.tag}: ${tags[0]} }`;
  const place: Place = { name: `\`${kind.tag}\``, example: tags[0], fix: `${kind.tag}: ${tags[0]}` };
  if (node.kind !== "map")
    return refuseShape(
      node,
      `a map with \`${kind.tag}\``,
      { name: shownName(name), example: fix, fix },
      context,
    );
  const entry = entryOf(node, kind.tag);
  if (entry === undefined) {
    const at = startOf(node.at);
    const label = `expected ${orList(tags)}`;
    context.report({
      code: "missing-key",
      at,
      message: `${shownName(name)} has no \`${kind.tag}\``,
      label,
      fix: place.fix,
    });
    return undefined;
  }
  const tag = readWord(entry.value, tags, place, context);
  if (tag === undefined) return undefined;
  const keys = kind.variants[tag];
  const of = { kind: "word", words: tags } as const;
  const all = {
    [kind.tag]: { of, need: "required", description: kind.description, example: tag },
    ...keys,
  } as const;
  const meant = checkKeys(node, { keys: all }, name, context);
  return { ...readKeys(node, keys, meant, context), [kind.tag]: tag };
}

function readShape(node: Node, shapes: Shapes, place: Place, name: string, context: Context): unknown {
  if (node.kind === "scalar" && shapes.words?.words.includes(node.text)) return node.text;
  const kind: Kind | undefined = node.kind === "unread" ? undefined : shapes[node.kind];
  if (kind !== undefined && !isEmpty(node)) return readKind(node, kind, place, name, context);
  if (node.kind === "scalar" && shapes.words !== undefined && shapes.scalar === undefined)
    return readWord(node, shapes.words.words, place, context);
  return refuseShape(node, expectedShapes(shapes), place, context);
}

function expectedShapes(shapes: Shapes): string {
  const parts = [
    ...(shapes.words === undefined ? [] : [orList(shapes.words.words)]),
    ...(shapes.scalar === undefined ? [] : ["a value"]),
    ...(shapes.list === undefined ? [] : ["a list"]),
    ...(shapes.map === undefined ? [] : ["a map"]),
  ];
  return parts.join(" or ");
}

export type { BlockKind };
