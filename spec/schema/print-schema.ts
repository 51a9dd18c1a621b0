import type { Schema } from "./kind-schema.ts";

const WIDTH = 200;

/** JSON with short values kept on one line, so that the committed file stays readable. */
function print(value: unknown, indent: string): string {
  const flat = JSON.stringify(value);
  if (typeof value !== "object" || value === null || indent.length + flat.length <= WIDTH) return flat;
  const inner = `${indent} `;
  const parts = Array.isArray(value)
    ? value.map((each) => `${inner}${print(each, inner)}`)
    : Object.entries(value).map(
        ([key, each]) => `${inner}${JSON.stringify(key)}: ${print(each, `${inner} `)}`,
      );
  const [open, close] = Array.isArray(value) ? ["[", "]"] : ["{", "}"];
  return `${open}\n${parts.join(",\n")}\n${indent}${close}`;
}

export const printSchema = (schema: Schema): string => `${print(schema, "")}\n`;
