import type { Span } from "../span.ts";
import { entryOf, type Node } from "../text/node.ts";

/** Span of the node at a path of keys and list positions; of the nearest enclosing node if it is not there. */
export function locate(root: Node, path: readonly (string | number)[]): Span {
  let node = root;
  for (const step of path) {
    const next = typeof step === "number" ? itemOf(node, step) : entryOf(node, step)?.value;
    if (next === undefined) return node.at;
    node = next;
  }
  return node.at;
}

const itemOf = (node: Node, index: number): Node | undefined =>
  node.kind === "list" ? node.items[index] : undefined;
