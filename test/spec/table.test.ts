import { describe, expect, test } from "vitest";
import { collectFindings } from "../../spec/diagnostics/report.ts";
import { placeOfKey } from "../../spec/read/context.ts";
import { readKind } from "../../spec/read/read-kind.ts";
import type { Key, KeySet, Kind } from "../../spec/table/kind.ts";
import { LOOP_FILE, PLANT_FILE } from "../../spec/table/loop-table.ts";
import { entryOf } from "../../spec/text/node.ts";
import { parseSource } from "../../spec/text/parse.ts";

/** Every key of the language with its dotted path. */
function keysOf(kind: Kind, path: string): readonly (readonly [string, Key])[] {
  const inBlock = (keys: KeySet, prefix: string) =>
    Object.entries(keys).flatMap(([name, key]) => [
      [`${prefix}.${name}`, key] as const,
      ...keysOf(key.of, `${prefix}.${name}`),
    ]);
  if (kind.kind === "block") return inBlock(kind.keys, path);
  if (kind.kind === "list" || kind.kind === "map") return keysOf(kind.of, path);
  if (kind.kind === "variants")
    return Object.entries(kind.variants).flatMap(([word, keys]) => inBlock(keys, `${path}.${word}`));
  if (kind.kind === "shape")
    return Object.values(kind.shapes).flatMap((each) =>
      each === undefined ? [] : keysOf(each as Kind, path),
    );
  return [];
}

const ALL = [...keysOf(LOOP_FILE, "loop"), ...keysOf(PLANT_FILE, "plant file")];
/** Blocks, maps and lists show only the start of what they take. */
const SHORTENED: readonly Kind["kind"][] = ["block", "map", "list"];
const WHOLE = ALL.filter(([, { of }]) => !SHORTENED.includes(of.kind));

/** The kinds of the table's own words: what its examples mean when the deciding words are the usual ones. */
const CHOICES = {
  coordinate: { word: "effective_area", at: { file: "f", line: 1, column: 1, endLine: 1, endColumn: 2 } },
  schedule: { word: "per_gauge_pressure", at: { file: "f", line: 1, column: 1, endLine: 1, endColumn: 2 } },
};

function problems(key: Key, value: string): readonly string[] {
  const findings = collectFindings();
  const parsed = parseSource({ file: "f", text: `key: ${value}\n` }, findings.report);
  const node = entryOf(parsed?.root, "key")?.value;
  if (node === undefined) return ["not YAML"];
  const context = { report: findings.report, choices: CHOICES };
  readKind(node, key.of, placeOfKey("key", key.example), "key", context);
  return findings.sorted().map(({ message }) => message);
}

describe("the table of the language", () => {
  test("has all sections", () => {
    expect(ALL.length).toBeGreaterThan(300);
    expect(new Set(ALL.map(([path]) => path)).size).toBeGreaterThan(250);
  });

  test("every example of a value is accepted by the reader", () => {
    const refused = WHOLE.flatMap(([path, key]) =>
      problems(key, key.example).map((text) => `${path}: ${text}`),
    );
    expect(refused).toEqual([]);
  });

  test("nonsense is refused wherever it is not a sentence", () => {
    const sentences: readonly Kind["kind"][] = ["text", "reference", "shape"];
    const taken = ALL.filter(([, { of }]) => !sentences.includes(of.kind)).filter(
      ([, key]) => problems(key, "three furlongs").length === 0,
    );
    expect(taken.map(([path]) => path)).toEqual([]);
  });

  test("every default is accepted by the reader", () => {
    const refused = ALL.filter(([, { standard = "" }]) => standard !== "").flatMap(([path, key]) =>
      problems(key, key.standard ?? "").map((text) => `${path}: ${text}`),
    );
    expect(refused).toEqual([]);
  });

  test("every key says what it is, and only keys with a default have one", () => {
    for (const [path, { description, need, standard }] of ALL) {
      expect(description.length, path).toBeGreaterThan(1);
      expect(need === "default", path).toBe(standard !== undefined);
    }
  });
});
