import {
  type Alias,
  Composer,
  CST,
  type Document,
  isAlias,
  isMap,
  isScalar,
  isSeq,
  Parser,
  type Range,
  type YAMLError,
  type Node as YamlNode,
} from "yaml";
import type { Report } from "../diagnostics/report.ts";
import type { Span } from "../span.ts";
import type { Entry, MapNode, Node } from "./node.ts";
import { type Positions, positionsOf } from "./positions.ts";
import type { Source } from "./source.ts";
import { yamlFinding } from "./yaml-findings.ts";

export const LARGEST_FILE = 2_000_000;
/** Deepest nesting read; the complete language needs 8. */
const DEEPEST = 60;
/** Nodes read through aliases in one file: an honest file needs a few hundred. */
const MOST_ALIAS_NODES = 20_000;

/** Errors after which the rest of the file still means what it says. */
const HARMLESS: readonly string[] = ["BAD_SCALAR_START"];

interface Work {
  readonly positions: Positions;
  readonly report: Report;
  /** Anchors seen so far, in the order of the text; looking each one up in the tree would take quadratic time. */
  readonly anchors: Map<string, YamlNode>;
  readonly budget: { aliasNodes: number; exceeded: boolean };
  /** Where values start that YAML itself could not read. */
  readonly unread: ReadonlySet<number>;
}

/** Nodes that are being converted: an alias to one of them would never end. */
interface Open {
  readonly nodes: readonly YamlNode[];
  readonly aliased: boolean;
}

export interface ParsedText {
  readonly root: MapNode;
  /** From here on YAML lost its way: what stands later may not be what was meant. */
  readonly brokenFrom?: Span;
}

/** Text to plain nodes with spans. Reports and goes on; undefined when nothing readable is left. Never throws. */
export function parseSource(source: Source, report: Report): ParsedText | undefined {
  const text = source.text.replace(/^\uFEFF/, "");
  const positions = positionsOf(source.file, text);
  const whole = positions.span(0, 0);
  if (text.length !== source.text.length)
    report({ code: "byte-order-mark", at: whole, message: "the file starts with a byte order mark" });
  if (text.length > LARGEST_FILE) return tooLarge(text.length, whole, report);
  const tokens = firstDocument([...new Parser().parse(text)], positions, report);
  if (tokens === undefined) return undefined;
  const [document] = new Composer({ prettyErrors: false, uniqueKeys: false, logLevel: "silent" }).compose(
    tokens,
    true,
    text.length,
  );
  const { errors } = document;
  const broken = errors.filter(({ code }) => !HARMLESS.includes(code));
  for (const error of withoutConsequences(errors, broken[0])) report(yamlFinding(error, text, positions));
  const unread = new Set(errors.map(({ pos }) => pos[0]));
  const budget = { aliasNodes: 0, exceeded: false };
  const root = rootOf({ positions, report, anchors: new Map(), budget, unread }, document, whole, errors);
  if (root === undefined || broken.length === 0) return root && { root };
  return { root, brokenFrom: positions.span(broken[0].pos[0], broken[0].pos[1]) };
}

/** As `parseSource`, the nodes alone. */
export const parseText = (source: Source, report: Report): MapNode | undefined =>
  parseSource(source, report)?.root;

/** What follows a broken place is mostly its consequence: of those errors only the first is shown. */
const withoutConsequences = (
  errors: readonly YAMLError[],
  broken: YAMLError | undefined,
): readonly YAMLError[] =>
  errors.filter(
    (error) => error === broken || HARMLESS.includes(error.code) || error.code === "TAB_AS_INDENT",
  );

function tooLarge(length: number, at: Span, report: Report): undefined {
  report({
    code: "file-too-large",
    at,
    message: `the file has ${length} characters; the limit is ${LARGEST_FILE}`,
    fix: "a loop spec is some kilobytes; check that this is the file you meant",
  });
  return undefined;
}

function rootOf(
  work: Work,
  document: Document,
  whole: Span,
  errors: readonly YAMLError[],
): MapNode | undefined {
  const { contents } = document;
  const root =
    contents === null ? undefined : convert(work, contents as YamlNode, { nodes: [], aliased: false });
  if (root?.kind === "map") return root;
  if (errors.length > 0) return undefined;
  work.report({
    code: "empty-file",
    at: root?.at ?? whole,
    message: "expected a map that starts with `spoolwright: 1`",
    fix: "spoolwright: 1",
  });
  return undefined;
}

/** Tokens of the first document; a second document or hopeless nesting is reported here, before composing recurses. */
function firstDocument(
  tokens: readonly CST.Token[],
  positions: Positions,
  report: Report,
): CST.Token[] | undefined {
  const isDocument = (token: CST.Token): boolean => token.type === "document";
  const first = tokens.findIndex(isDocument);
  const second = tokens.findIndex((token, i) => i > first && isDocument(token));
  const kept = second === -1 ? tokens : tokens.slice(0, second);
  const extra = tokens[second];
  if (extra !== undefined && first !== -1)
    report({
      code: "several-documents",
      at: positions.span(extra.offset, extra.offset + 3),
      message: "a second YAML document starts here; only one is read",
      fix: "put the second document into its own file",
    });
  const deep = kept.map(tooDeep).find((offset) => offset !== undefined);
  if (deep === undefined) return [...kept];
  report({
    code: "nested-too-deep",
    at: positions.span(deep, deep + 1),
    message: `more than ${DEEPEST} levels of nesting`,
  });
  return undefined;
}

/** Offset of the first token beyond the depth limit; iterative, since the text decides the depth. */
function tooDeep(root: CST.Token): number | undefined {
  const waiting: { readonly token: CST.Token; readonly depth: number }[] = [{ token: root, depth: 0 }];
  for (let next = waiting.pop(); next !== undefined; next = waiting.pop()) {
    const { token, depth } = next;
    if (depth > DEEPEST) return token.offset;
    for (const inner of innerTokens(token)) waiting.push({ token: inner, depth: depth + 1 });
  }
  return undefined;
}

function innerTokens(token: CST.Token): CST.Token[] {
  if (token.type === "document") return token.value === undefined ? [] : [token.value];
  if (!CST.isCollection(token)) return [];
  return token.items.flatMap((item) => [item.key, item.value]).filter((each) => each != null);
}

function convert(work: Work, node: YamlNode, open: Open): Node {
  const [start, end] = (node.range ?? [0, 0, 0]) as Range;
  const at = work.positions.span(start, Math.max(end, start));
  if (isAlias(node)) return convertAlias(work, node, at, open);
  if (work.unread.has(start) && isScalar(node)) return { kind: "unread", at };
  if (open.aliased) work.budget.aliasNodes += 1;
  if (node.anchor !== undefined && !open.aliased) work.anchors.set(node.anchor, node);
  const inside = { ...open, nodes: [...open.nodes, node] };
  if (isMap(node)) return { kind: "map", entries: convertEntries(work, node.items, inside), at };
  if (isSeq(node))
    return { kind: "list", items: node.items.map((item) => convert(work, item as YamlNode, inside)), at };
  if (!isScalar(node)) return { kind: "unread", at };
  const quoted = node.type !== "PLAIN" && node.type !== undefined;
  const text = typeof node.value === "string" ? node.value : (node.source ?? "");
  return { kind: "scalar", text, quoted, at };
}

function convertAlias(work: Work, alias: Alias, at: Span, open: Open): Node {
  const target = work.anchors.get(alias.source);
  if (target === undefined || open.nodes.includes(target))
    work.report({
      code: "unknown-alias",
      at,
      message: `no anchor \`&${alias.source}\` stands before this alias`,
      label: target === undefined ? "the anchor is missing" : "the alias stands inside its own anchor",
    });
  else if (work.budget.aliasNodes <= MOST_ALIAS_NODES)
    return convert(work, target, { ...open, aliased: true });
  else if (!work.budget.exceeded) {
    work.budget.exceeded = true;
    work.report({
      code: "alias-bomb",
      at,
      message: `aliases expand to more than ${MOST_ALIAS_NODES} values`,
      fix: "write the values out",
    });
  }
  return { kind: "unread", at };
}

function convertEntries(
  work: Work,
  items: readonly { readonly key: unknown; readonly value: unknown }[],
  open: Open,
): Entry[] {
  const seen = new Map<string, Entry>();
  for (const item of items) {
    const entry = convertEntry(work, item.key as YamlNode, item.value as YamlNode | null, open);
    const before = entry === undefined ? undefined : seen.get(entry.key);
    if (entry === undefined) continue;
    if (before === undefined) seen.set(entry.key, entry);
    else
      work.report({
        code: "duplicate-key",
        at: entry.keyAt,
        message: `\`${entry.key}\` is given twice`,
        because: [{ at: before.keyAt, message: "the first one" }],
        fix: "keep one of the two lines",
      });
  }
  return [...seen.values()];
}

function convertEntry(
  work: Work,
  keyNode: YamlNode,
  valueNode: YamlNode | null,
  open: Open,
): Entry | undefined {
  const key = convert(work, keyNode, open);
  if (key.kind === "unread") return undefined;
  if (key.kind !== "scalar") {
    work.report({ code: "key-not-text", at: key.at, message: "a key must be a plain word" });
    return undefined;
  }
  const value = valueNode === null ? undefined : convert(work, valueNode, open);
  return {
    key: key.text,
    keyAt: key.at,
    value: value ?? { kind: "scalar", text: "", quoted: false, at: key.at },
  };
}
