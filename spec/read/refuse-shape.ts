import { isEmpty, type Node } from "../text/node.ts";
import type { Context, Place } from "./context.ts";
import { quote } from "./suggest.ts";

const NAMES = { scalar: "a single value", list: "a list", map: "a map of keys" } as const;

/** Reports a list where a number belongs, and the like. */
export function refuseShape(node: Node, expected: string, place: Place, context: Context): undefined {
  if (node.kind === "unread") return undefined;
  const empty = isEmpty(node);
  const got = empty ? "nothing" : node.kind === "scalar" ? quote(node.text) : NAMES[node.kind];
  context.report({
    code: empty ? "missing-value" : "wrong-type",
    at: node.at,
    message: `${place.name} needs ${expected}, got ${got}`,
    label: `expected ${expected}`,
    fix: place.fix,
  });
  return undefined;
}
