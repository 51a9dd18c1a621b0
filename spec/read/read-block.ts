import type { Span } from "../span.ts";
import type { BlockKind, BlockValue, Key, KeySet } from "../table/kind.ts";
import type { Entry, MapNode, Node } from "../text/node.ts";
import type { Context } from "./context.ts";
import { placeOfKey } from "./context.ts";
import { readKind } from "./read-kind.ts";
import { refuseShape } from "./refuse-shape.ts";
import { nearestName, orList, quote } from "./suggest.ts";

type Values = Record<string, unknown>;
/** Known keys that a misspelt key stands for, with its place: they are not reported as missing too. */
type Meant = ReadonlyMap<string, Span>;

export const camel = (name: string): string =>
  name.replace(/_([a-z0-9])/g, (_, letter: string) => letter.toUpperCase());

/** Reads a map by its keys; absent keys get their default, everything else is reported. Holes stay undefined. */
export function readBlock(node: Node, kind: BlockKind, name: string, context: Context): Values | undefined {
  if (node.kind !== "map") {
    const place = { name: `\`${name}\``, example: "", fix: exampleBlock(name, kind.keys) };
    return refuseShape(node, `a map with ${orList(Object.keys(kind.keys))}`, place, context);
  }
  const meant = checkUnknown(node, kind, name, context);
  checkOneOf(node, kind, name, meant, context);
  return readKeys(node, kind.keys, name, meant, context);
}

const exampleBlock = (name: string, keys: KeySet): string =>
  `${name}: { ${Object.entries(keys)
    .filter(([, key]) => key.need === "required")
    .slice(0, 2)
    .map(([key, { example }]) => `${key}: ${example}`)
    .join(", ")} }`;

/** Values of the given keys, by their camel-case names, with the place of each. */
export function readKeys(node: MapNode, keys: KeySet, name: string, meant: Meant, context: Context): Values {
  const entries = new Map(node.entries.map((entry) => [entry.key, entry]));
  const places: Record<string, Span> = {};
  const values: Values = { span: node.at, places };
  for (const [key, definition] of Object.entries(keys)) {
    const entry = entries.get(key);
    places[key] = entry?.value.at ?? meant.get(key) ?? node.at;
    values[camel(key)] = readKey(key, definition, entry, { block: name, at: node.at, meant }, context);
  }
  return values;
}

interface Surroundings {
  readonly block: string;
  readonly at: Span;
  readonly meant: Meant;
}

function readKey(
  key: string,
  definition: Key,
  entry: Entry | undefined,
  around: Surroundings,
  context: Context,
): unknown {
  const place = placeOfKey(key, definition.example);
  if (entry !== undefined) return readKind(entry.value, definition.of, place, key, context);
  if (definition.standard !== undefined)
    return readKind(standardNode(definition.standard, around.at), definition.of, place, key, context);
  if (definition.need === "required" && !around.meant.has(key))
    context.report({
      code: "missing-key",
      at: startOf(around.at),
      message: `\`${around.block}\` has no \`${key}\``,
      label: `needs \`${key}\`: ${definition.description}`,
      fix: place.fix,
    });
  return undefined;
}

/** A missing key is shown where its block starts, not over all its lines. */
const startOf = (at: Span): Span => ({ ...at, endLine: at.line, endColumn: at.column + 1 });

const standardNode = (text: string, at: Span): Node =>
  text === "{}" ? { kind: "map", entries: [], at } : { kind: "scalar", text, quoted: text === "", at };

/** Reports keys that the block does not have; returns the known keys they were meant to be. */
export function checkUnknown(
  node: MapNode,
  kind: Pick<BlockKind, "keys" | "reserved">,
  name: string,
  context: Context,
): Meant {
  const known = Object.keys(kind.keys);
  const present = new Set(node.entries.map((entry) => entry.key));
  const meant = new Map<string, Span>();
  for (const { key, keyAt } of node.entries) {
    if (Object.hasOwn(kind.keys, key)) continue;
    if (kind.reserved?.includes(key)) refuseReserved(key, keyAt, context);
    else {
      const near = nearestName(
        key,
        known.filter((each) => !present.has(each)),
      );
      if (near !== undefined) meant.set(near, keyAt);
      context.report({
        code: "unknown-key",
        at: keyAt,
        message: `\`${name}\` has no key ${quote(key)}`,
        label: near === undefined ? `known keys: ${orList(known)}` : `did you mean \`${near}\`?`,
        ...(near === undefined ? {} : { fix: `${near}: ${kind.keys[near].example}` }),
      });
    }
  }
  return meant;
}

function refuseReserved(key: string, at: Span, context: Context): void {
  context.report({
    code: "not-yet-supported",
    at,
    message: `\`${key}\` is part of the language's design but has no effect in this version`,
    label: "remove it: a key without effect would mislead",
    fix: `# ${key}: not supported yet`,
  });
}

function checkOneOf(node: MapNode, kind: BlockKind, name: string, meant: Meant, context: Context): void {
  if (kind.oneOf === undefined || kind.oneOf.some((key) => meant.has(key))) return;
  const found = node.entries.filter((entry) => kind.oneOf?.includes(entry.key));
  if (found.length === 1) return;
  const [first, second] = found;
  context.report({
    code: "one-of",
    at: second?.keyAt ?? startOf(node.at),
    message:
      second === undefined
        ? `\`${name}\` needs one of ${orList(kind.oneOf)}`
        : `\`${name}\` has both \`${first.key}\` and \`${second.key}\`; only one is possible`,
    ...(second === undefined ? {} : { because: [{ at: first.keyAt, message: "the other one" }] }),
    fix: `${kind.oneOf[0]}: ${kind.keys[kind.oneOf[0]].example}`,
  });
}

/** A whole file, as its table says; the one place where the table's types meet what was read. */
export const readFile = <const Keys extends KeySet>(
  root: MapNode,
  kind: BlockKind<Keys>,
  context: Context,
): BlockValue<Keys, "holed"> =>
  readBlock(root, kind, "the file", context) as unknown as BlockValue<Keys, "holed">;
