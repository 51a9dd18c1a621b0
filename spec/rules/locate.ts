import { entryOf, type Node } from "../text/node.ts";

/** The node at a path of keys and list positions; the nearest enclosing node if it is not there. */
export function locate(root: Node, path: readonly (string | number)[]): Node {
  let node = root;
  for (const step of path) {
    const next = typeof step === "number" ? itemOf(node, step) : entryOf(node, step)?.value;
    if (next === undefined) return node;
    node = next;
  }
  return node;
}

const itemOf = (node: Node, index: number): Node | undefined =>
  node.kind === "list" ? node.items[index] : undefined;
