import { readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { type ParameterName, plantParameters } from "../../hil-sim/index.ts";
import { engineA } from "./engines.ts";

const README = readFileSync(new URL("../../hil-sim/README.md", import.meta.url), "utf8");

/** Names of a table cell list, with `…Linear` completed from the name before it. */
function namesIn(cell: string): string[] {
  const names: string[] = [];
  for (const part of cell.split(",").map((text) => text.trim())) {
    const stem = names[0]?.replace(/(Base|Rise|Flow|Linear)$/, "") ?? "";
    names.push(part.startsWith("…") ? stem + part.slice(1) : part);
  }
  return names;
}

test("the table of symbols names every parameter once and no other", () => {
  const table = README.slice(README.indexOf("| symbol | parameter |"), README.indexOf("| symbol | state |"));
  const rows = table
    .split("\n")
    .slice(2)
    .filter((line) => line.startsWith("|"));
  const named = rows.flatMap((line) => namesIn(line.split("|")[2])).sort();
  expect(named).toEqual((Object.keys(plantParameters(engineA)) as ParameterName[]).sort());
});
