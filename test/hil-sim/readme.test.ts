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
  const lines = README.split("\n");
  const heads = lines.flatMap((line, i) => (/^\| *symbol +\|/.test(line) ? [i] : []));
  const rows = lines.slice(heads[0] + 2, heads[1]).filter((line) => line.startsWith("|"));
  const named = rows.flatMap((line) => namesIn(line.split("|")[2])).sort();
  expect(named).toEqual((Object.keys(plantParameters(engineA)) as ParameterName[]).sort());
});
