import { readFileSync } from "node:fs";
import { rowsOf } from "./table.ts";

/** Text of a reference file: made by an independent Python implementation of the equations and scipy's LSODA at rtol 1e-9. */
export function referenceText(name: string): string {
  return readFileSync(new URL(`../reference/plant/${name}`, import.meta.url), "utf8");
}

/** Rows of a reference table by column name. */
export function referenceTable(name: string): Record<string, number>[] {
  return rowsOf(referenceText(name));
}
