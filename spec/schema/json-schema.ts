import type { Kind } from "../table/kind.ts";
import { LOOP_FILE, PLANT_FILE } from "../table/loop-table.ts";
import { type Definitions, kindSchema, type Schema, SHARED } from "./kind-schema.ts";

/** Kinds by identity: what the table builds once and uses twice is described once. */
function collectDefinitions(): Definitions & { readonly all: () => Schema } {
  const names = new Map<Kind, string>();
  const made = new Map<string, Schema>();
  return {
    refer(kind, path, make) {
      const name = names.get(kind) ?? path;
      if (!names.has(kind)) {
        if (made.has(name)) throw new Error(`two kinds of the table would be called ${name} in the schema`);
        names.set(kind, name);
        made.set(name, make());
      }
      return { $ref: `#/$defs/${name}` };
    },
    all: () => Object.fromEntries([...made].sort(([a], [b]) => (a < b ? -1 : 1))),
  };
}

/** JSON Schema (draft 2020-12) of loop specs and plant files, for editors; made from the reader's own table. */
export function jsonSchema(): Schema {
  const definitions = collectDefinitions();
  const files = [
    kindSchema(LOOP_FILE, "loop", definitions),
    kindSchema(PLANT_FILE, "plant_file", definitions),
  ];
  return {
    $schema: "https://json-schema.org/draft/2020-12/schema",
    title: "spoolwright loop spec or plant file",
    anyOf: files,
    $defs: { ...SHARED, ...definitions.all() },
  };
}
