import type { Span } from "../span.ts";

/** A YAML value without YAML: what the readers see. Aliases are already replaced by what they stand for. */
export type Node = ScalarNode | MapNode | ListNode | UnreadNode;

export interface ScalarNode {
  readonly kind: "scalar";
  /** The value as text; for plain scalars exactly as written. */
  readonly text: string;
  readonly quoted: boolean;
  readonly at: Span;
}

export interface Entry {
  readonly key: string;
  readonly keyAt: Span;
  readonly value: Node;
}

export interface MapNode {
  readonly kind: "map";
  readonly entries: readonly Entry[];
  readonly at: Span;
}

/** Something is wrong here and reported already: readers pass over it in silence. */
export interface UnreadNode {
  readonly kind: "unread";
  readonly at: Span;
}

export interface ListNode {
  readonly kind: "list";
  readonly items: readonly Node[];
  readonly at: Span;
}

/** Nothing after the colon, or `null` or `~`. */
export const isEmpty = (node: Node): boolean =>
  node.kind === "scalar" && !node.quoted && /^(null|~|)$/i.test(node.text);

export const entryOf = (node: Node | undefined, key: string): Entry | undefined =>
  node?.kind === "map" ? node.entries.find((each) => each.key === key) : undefined;

/** The value at a path of keys, if every step is there. */
export const valueAt = (node: Node | undefined, path: readonly string[]): Node | undefined =>
  path.reduce<Node | undefined>((at, key) => entryOf(at, key)?.value, node);
