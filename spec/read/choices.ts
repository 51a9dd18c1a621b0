import type { words } from "../table/build.ts";
import { CONTROLLER_BLOCK } from "../table/controller-table.ts";
import { type Node, valueAt } from "../text/node.ts";
import type { Chosen, Context } from "./context.ts";

const { coordinate, schedule } = CONTROLLER_BLOCK.keys.feedback.of.keys;

/** The word at a path, if it is one of those the key takes; a wrong word is reported when its key is read. */
function chosen(root: Node, path: readonly string[], of: ReturnType<typeof words>): Chosen | undefined {
  const node = valueAt(root, path);
  return node?.kind === "scalar" && of.words.includes(node.text)
    ? { word: node.text, at: node.at }
    : undefined;
}

/** The words that decide units elsewhere, looked up before reading starts. */
export function choicesOf(root: Node): Context["choices"] {
  const feedback = ["controller", "feedback"];
  const found = {
    coordinate: chosen(root, [...feedback, "coordinate"], coordinate.of),
    schedule: chosen(root, [...feedback, "schedule"], schedule.of),
  };
  return {
    ...(found.coordinate === undefined ? {} : { coordinate: found.coordinate }),
    ...(found.schedule === undefined ? {} : { schedule: found.schedule }),
  };
}
