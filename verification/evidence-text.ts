import type { Evidence } from "./evidence.ts";

/**
 * The bytes of evidence.json: two spaces of indent, lists of numbers on one line, a line end at the end. Equal evidence
 * gives equal bytes.
 */
export function evidenceText(evidence: Evidence): string {
  const text = JSON.stringify(evidence, null, 2);
  return `${text.replace(NUMBERS, (list) => list.replace(/\s+/g, " ").replace("[ ", "[").replace(" ]", "]"))}\n`;
}

/** A list of numbers only, as JSON.stringify breaks it into lines. */
const NUMBERS = /\[\s+-?\d[\d.e+-]*(?:,\s+-?\d[\d.e+-]*)*\s+\]/g;
