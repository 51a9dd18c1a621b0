import type { Span } from "../span.ts";
import { camel } from "../table/camel.ts";
import type { BlockKind, BlockValue, Key, KeySet } from "../table/kind.ts";
import type { Entry, MapNode, Node } from "../text/node.ts";
import { checkKeys, type Meant } from "./check-keys.ts";
import { type Context, placeOfKey } from "./context.ts";
import { readKind } from "./read-kind.ts";
import { refuseShape } from "./refuse-shape.ts";
import { orList, shownName } from "./suggest.ts";

type Values = Record<string, unknown>;

/** Reads a map by its keys; absent keys get their default, everything else is reported. Holes stay undefined. */
export function readBlock(node: Node, kind: BlockKind, name: string, context: Context): Values | undefined {
  if (node.kind === "map") return readKeys(node, kind.keys, checkKeys(node, kind, name, context), context);
  const place = { name: shownName(name), example: "", fix: exampleBlock(name, kind.keys) };
  return refuseShape(node, `a map with ${orList(Object.keys(kind.keys))}`, place, context);
}

const exampleBlock = (name: string, keys: KeySet): string =>
  `${name}: { ${Object.entries(keys)
    .filter(([, key]) => key.need === "required")
    .slice(0, 2)
    .map(([key, { example }]) => `${key}: ${example}`)
    .join(", ")} }`;

/** Values of the given keys, by their camel-case names, with the place of each. */
export function readKeys(node: MapNode, keys: KeySet, meant: Meant, context: Context): Values {
  const entries = new Map(node.entries.map((entry) => [entry.key, entry]));
  const places: Record<string, Span> = {};
  const values: Values = { span: node.at, places };
  for (const [key, definition] of Object.entries(keys)) {
    const entry = entries.get(key);
    places[key] = entry?.value.at ?? meant.get(key) ?? node.at;
    values[camel(key)] = readKey(key, definition, entry, node.at, context);
  }
  return values;
}

function readKey(
  key: string,
  definition: Key,
  entry: Entry | undefined,
  at: Span,
  context: Context,
): unknown {
  const { of, example, standard } = definition;
  const node = entry?.value ?? (standard === undefined ? undefined : standardNode(standard, at));
  return node && readKind(node, of, placeOfKey(key, example), key, context);
}

/** Defaults are single values, or an empty map or list. */
function standardNode(text: string, at: Span): Node {
  if (text === "{}") return { kind: "map", entries: [], at };
  if (text === "[]") return { kind: "list", items: [], at };
  return { kind: "scalar", text, quoted: text === "", at };
}

/** A whole file, as its table says; the one place where the table's types meet what was read. */
export const readFile = <const Keys extends KeySet>(
  root: MapNode,
  kind: BlockKind<Keys>,
  context: Context,
): BlockValue<Keys, "holed"> =>
  readBlock(root, kind, "the file", context) as unknown as BlockValue<Keys, "holed">;
