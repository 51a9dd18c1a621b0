import { createHash } from "node:crypto";

/**
 * SHA-256 (hex) of what data means: places in files, texts as written, unit spellings and descriptions are left out,
 * so moving a comment, or writing 2.4 bar for 240 kPa, leaves the hash alone.
 */
export function meaningHash(data: unknown): string {
  return createHash("sha256")
    .update(JSON.stringify(meaningOf(data)))
    .digest("hex");
}

const NO_MEANING = new Set([
  "written",
  "unit",
  "axisUnit",
  "rowsUnit",
  "columnsUnit",
  "description",
  "says",
  "places",
]);

/** The data with sorted keys and without the rest. */
function meaningOf(data: unknown): unknown {
  if (typeof data === "bigint") return `${data}`;
  if (typeof data !== "object" || data === null) return data;
  if (Array.isArray(data)) return data.map(meaningOf);
  const kept = Object.entries(data).filter(([key, value]) => !NO_MEANING.has(key) && !isSpan(value));
  kept.sort(([a], [b]) => (a < b ? -1 : 1));
  return Object.fromEntries(kept.map(([key, value]) => [key, meaningOf(value)]));
}

function isSpan(value: unknown): boolean {
  return typeof value === "object" && value !== null && "endColumn" in value && "file" in value;
}
