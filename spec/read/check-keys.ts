import type { Span } from "../span.ts";
import type { BlockKind, KeySet } from "../table/kind.ts";
import type { Entry, MapNode } from "../text/node.ts";
import { startOf } from "../text/positions.ts";
import type { Context } from "./context.ts";
import { nearestName, orList, quote, shownName } from "./suggest.ts";

/** Known keys that a misspelt key stands for, with its place: they are not reported as missing too. */
export type Meant = ReadonlyMap<string, Span>;
type Block = Pick<BlockKind, "keys" | "reserved" | "oneOf">;

/** Reports unknown, missing and contradicting keys of a block. */
export function checkKeys(node: MapNode, block: Block, name: string, context: Context): Meant {
  const meant = checkUnknown(node, block, name, context);
  checkMissing(node, block.keys, name, meant, context);
  if (block.oneOf !== undefined) checkOneOf(node, block.keys, block.oneOf, name, meant, context);
  return meant;
}

function checkUnknown(node: MapNode, block: Block, name: string, context: Context): Meant {
  const present = new Set(node.entries.map((entry) => entry.key));
  const free = Object.keys(block.keys).filter((each) => !present.has(each));
  const meant = new Map<string, Span>();
  for (const { key, keyAt, value } of node.entries) {
    if (Object.hasOwn(block.keys, key)) continue;
    const near = nearestName(key, free);
    if (block.reserved?.includes(key)) refuseReserved(key, keyAt, context);
    else if (SPLIT_NUMBER.test(key)) refuseSplitNumber(key, keyAt, context);
    else refuseUnknown({ key, keyAt, value }, near, block.keys, name, context);
    if (near !== undefined) meant.set(near, keyAt);
  }
  return meant;
}

function refuseUnknown(
  { key, keyAt: at, value }: Entry,
  near: string | undefined,
  keys: KeySet,
  name: string,
  context: Context,
): void {
  const own = value.kind === "scalar" && !value.quoted ? value.text : "";
  context.report({
    code: "unknown-key",
    at,
    message: `${shownName(name)} has no key ${quote(key)}`,
    label: near === undefined ? `known keys: ${orList(Object.keys(keys))}` : `did you mean \`${near}\`?`,
    ...(near === undefined ? {} : { fix: `${near}: ${own || keys[near].example}` }),
  });
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

/** `{ limit: 165,000 rpm }` is `limit: 165` and a key `000 rpm`. */
const SPLIT_NUMBER = /^\d{3}(\s|$)/;

function refuseSplitNumber(key: string, at: Span, context: Context): void {
  context.report({
    code: "number-format",
    at,
    message: `the comma before ${quote(key)} ends the number and starts a new key`,
    label: "write digits without grouping",
  });
}

/** All missing keys of a block are one finding: the block is incomplete. */
function checkMissing(node: MapNode, keys: KeySet, name: string, meant: Meant, context: Context): void {
  const present = new Set(node.entries.map((entry) => entry.key));
  const missing = Object.entries(keys).filter(
    ([key, { need }]) => need === "required" && !present.has(key) && !meant.has(key),
  );
  if (missing.length === 0) return;
  const lines = missing.map(([key, { example }]) => `${key}: ${example}`);
  const fix = lines.length === 1 ? lines[0] : `{ ${lines.join(", ")} }`;
  context.report({
    code: "missing-key",
    at: startOf(node.at),
    message: `${shownName(name)} has no ${andList(missing.map(([key]) => key))}`,
    label: missing.map(([key, { description }]) => `\`${key}\`: ${description}`)[0],
    ...(fix.length <= LONGEST_FIX ? { fix } : {}),
  });
}

const LONGEST_FIX = 240;
const andList = (names: readonly string[]): string => orList(names, 20).replace(" or ", " and no ");

function checkOneOf(
  node: MapNode,
  keys: KeySet,
  oneOf: readonly string[],
  name: string,
  meant: Meant,
  context: Context,
): void {
  const found = node.entries.filter((entry) => oneOf.includes(entry.key));
  const [first, second] = found;
  if (second !== undefined) refuseSecond(first, second, name, context);
  else if (first === undefined && !oneOf.some((key) => meant.has(key)))
    context.report({
      code: "one-of",
      at: startOf(node.at),
      message: `${shownName(name)} needs one of ${orList(oneOf)}`,
      fix: `${oneOf[0]}: ${keys[oneOf[0]].example}`,
    });
}

function refuseSecond(first: Entry, second: Entry, name: string, context: Context): void {
  context.report({
    code: "one-of",
    at: second.keyAt,
    message: `${shownName(name)} has both \`${first.key}\` and \`${second.key}\`; only one is possible`,
    because: [{ at: first.keyAt, message: "the other one" }],
    fix: `move \`${second.key}\` to an item of its own`,
  });
}
