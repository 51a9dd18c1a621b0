import {
  type Document,
  isCollection,
  isMap,
  isNode,
  isPair,
  isSeq,
  type Node,
  parseDocument,
  stringify,
} from "yaml";

export type SpecValue =
  | string
  | number
  | boolean
  | null
  | readonly SpecValue[]
  | { readonly [key: string]: SpecValue };

/**
 * The text of a YAML file with the value at `path` (`controller.feedback.proportional`, `requirements[2].id`) replaced,
 * added to its map or list, or, for `undefined`, taken out; the rest of the text stays as it is, comments too.
 * Lists and maps written in lines stay in lines, all else is written in one line.
 * @throws when the text is not YAML, or nothing is at the parent of the path: mistakes of the caller.
 */
export function setInSpec(text: string, path: string, value: SpecValue | undefined): string {
  const document = parseDocument(text);
  if (document.errors.length > 0) throw new Error(`cannot edit: ${document.errors[0].message}`);
  const found = find(document, path);
  if (!found) throw new Error(`cannot edit: there is no list or map at the parent of \`${path}\``);
  const { parent, places, key, index } = found;
  if (value === undefined) return index in places ? remove(text, parent, places, index) : text;
  const old = places[index];
  if (old) return replace(text, old.value, value);
  return add(text, parent, places, isMap(parent) ? `${stringify(key).trim()}: ` : "", value);
}

/** Where the value at `path` stands in a text, its key included, as offsets; undefined where there is none. Never throws. */
export function placeInSpec(text: string, path: string): readonly [start: number, end: number] | undefined {
  const document = parseDocument(text);
  const found = document.errors.length > 0 ? undefined : find(document, path);
  const place = found?.places[found.index];
  return place && [place.start, place.end];
}

interface Found {
  readonly parent: Node;
  readonly places: readonly Place[];
  readonly key: string;
  readonly index: number;
}

function find(document: Document, path: string): Found | undefined {
  const keys = path.split(/[.[\]]+/).filter((step) => step !== "");
  const key = keys[keys.length - 1];
  const parent = keys.length > 1 ? document.getIn(keys.slice(0, -1), true) : document.contents;
  if (!isCollection(parent)) return undefined;
  const places = placesOf(parent as Node);
  const index = isSeq(parent) ? Number(key) : places.findIndex((place) => place.key === key);
  return { parent: parent as Node, places, key, index };
}

/** Where an item of a list or map begins and ends (comments behind it left out). */
interface Place {
  readonly key: string;
  readonly value: Node;
  readonly start: number;
  readonly end: number;
}

function placesOf(collection: Node): Place[] {
  if (!isCollection(collection)) return [];
  return collection.items.map((item) => {
    const value = (isPair(item) ? item.value : item) as Node;
    const first = (isPair(item) ? item.key : item) as Node;
    return { key: String(first), value, start: rangeOf(first)[0], end: contentEnd(value) };
  });
}

function rangeOf(node: Node): readonly [number, number] {
  if (!isNode(node) || !node.range) throw new Error("cannot edit: a value without a place");
  return [node.range[0], node.range[1]];
}

/** End of the last thing written in a node; blocks of lines also own the space behind them. */
function contentEnd(node: Node): number {
  if (!isCollection(node) || node.flow || node.items.length === 0) return rangeOf(node)[1];
  const places = placesOf(node);
  return places[places.length - 1].end;
}

function replace(text: string, old: Node, value: SpecValue): string {
  const [start] = rangeOf(old);
  const lines = isCollection(old) && !old.flow ? linesOf(value) : undefined;
  const written = lines ? lines.join(`\n${indentAt(text, start)}`) : oneLine(value);
  const gap = text[start - 1] === ":" ? " " : "";
  return text.slice(0, start) + gap + written + text.slice(contentEnd(old));
}

function add(text: string, parent: Node, places: readonly Place[], prefix: string, value: SpecValue): string {
  const written = prefix + oneLine(value);
  const last = places[places.length - 1];
  if (!isCollection(parent) || parent.flow || last === undefined) {
    const at = last ? last.end : rangeOf(parent)[0] + 1;
    return `${text.slice(0, at)}${last ? ", " : " "}${written}${text.slice(at)}`;
  }
  const lineEnd = endOfLine(text, last.end);
  const dash = isSeq(parent) ? "- " : "";
  const indent = indentAt(text, rangeOf(parent)[0]);
  return `${text.slice(0, lineEnd)}\n${indent}${dash}${written}${text.slice(lineEnd)}`;
}

function remove(text: string, parent: Node, places: readonly Place[], index: number): string {
  const { start, end } = places[index];
  const next = places[index + 1];
  const lineStart = text.lastIndexOf("\n", start) + 1;
  const alone = isCollection(parent) && !parent.flow && /^\s*(-\s+)?$/.test(text.slice(lineStart, start));
  const dashed = isMap(parent) && text.slice(lineStart, start).includes("-");
  if (alone && !dashed) return text.slice(0, lineStart) + text.slice(endOfLine(text, end) + 1);
  if (next) return text.slice(0, start) + text.slice(next.start);
  const from = index > 0 ? places[index - 1].end : start;
  return text.slice(0, from) + text.slice(end);
}

function endOfLine(text: string, from: number): number {
  const found = text.indexOf("\n", from);
  return found < 0 ? text.length : found;
}

/** Spaces up to the column of `at`. */
function indentAt(text: string, at: number): string {
  return " ".repeat(at - text.lastIndexOf("\n", at - 1) - 1);
}

/** A list or map as lines whose items are each on one line; undefined for a scalar or nothing. */
function linesOf(value: SpecValue): string[] | undefined {
  if (Array.isArray(value)) {
    return value.length > 0 ? value.map((item: SpecValue) => `- ${oneLine(item)}`) : undefined;
  }
  if (typeof value !== "object" || value === null) return undefined;
  const entries = Object.entries(value);
  return entries.length > 0
    ? entries.map(([key, item]) => `${stringify(key).trim()}: ${oneLine(item)}`)
    : undefined;
}

/** JSON, which is YAML too, keeps a text of several lines in one. */
function oneLine(value: SpecValue): string {
  const text = stringify(value, {
    collectionStyle: "flow",
    lineWidth: 0,
    flowCollectionPadding: false,
  }).trim();
  return text.includes("\n") ? JSON.stringify(value) : text;
}
