import type { Span } from "../span.ts";
import type { Context } from "./context.ts";
import type { Axis } from "./read-axis.ts";
import { counted } from "./suggest.ts";

/** Reports a list of values that does not fit its axis. */
export function reportSize(
  at: Span,
  says: string,
  axis: Axis,
  word: "number" | "row",
  context: Context,
): undefined {
  const count = axis.points.length;
  context.report({
    code: "wrong-table-size",
    at,
    message: says,
    label: `expected ${counted(count, word)}`,
    because: [{ at: axis.node.at, message: `\`${axis.over}\` has ${counted(count, "point")}` }],
    fix: `give one ${word} for each of the ${count} points of \`${axis.over}\``,
  });
  return undefined;
}
