import { readFileSync, writeFileSync } from "node:fs";
import { type Schema, Validator } from "@cfworker/json-schema";
import { describe, expect, test } from "vitest";
import { parse } from "yaml";
import { jsonSchema, printSchema, readLoopSpec } from "../../spec/index.ts";
import { openTestFile, SMALLEST, testFile } from "./files.ts";

const COMMITTED = new URL("../../spec/spoolwright.schema.json", import.meta.url);

test("the committed JSON Schema is the one the reader's table gives", () => {
  const printed = printSchema(jsonSchema());
  if (process.env.ACCEPT_SCHEMA) writeFileSync(COMMITTED, printed);
  const committed = readFileSync(COMMITTED, "utf8");
  expect(printed === committed, "renew with: ACCEPT_SCHEMA=1 npx vitest run test/spec/schema.test.ts").toBe(
    true,
  );
});

test("the printed schema is JSON with the same content", () => {
  expect(JSON.parse(printSchema(jsonSchema()))).toEqual(jsonSchema());
});

// An independent validator of draft 2020-12 reads the schema: an editor sees what the reader sees.
const validator = new Validator(jsonSchema() as Schema, "2020-12");
const isValid = (text: string): boolean => validator.validate(parse(text, { uniqueKeys: false })).valid;

describe("the schema, read by an independent validator", () => {
  test.each(["complete.yaml", "engine.plant.yaml"])("takes %s", (name) => {
    expect(validator.validate(parse(testFile(name).text)).errors.slice(0, 3)).toEqual([]);
  });

  test.each([
    ["a misspelt key", "proportional:", "proportinal:"],
    ["a key from another world", "  step: 5 ms", "  step: 5 ms\n  colour: blue"],
    ["a missing key", "    ceiling: 245 kPa abs\n", ""],
    ["a word that is not offered", "method: conditional", "method: none_of_these"],
    ["a number without its unit", "step: 5 ms", "step: 5"],
    ["a list where a value belongs", "step: 5 ms", "step: [5 ms]"],
    ["a name that is no identifier", "name: boost", "name: 2nd boost"],
    ["two documents' worth of version", "spoolwright: 1", "spoolwright: 2"],
  ])("refuses %s, as the reader does", (_, from, to) => {
    const text = SMALLEST.replace(from, to);
    expect(isValid(SMALLEST)).toBe(true);
    expect(isValid(text)).toBe(false);
    expect(readLoopSpec({ file: "loop.yaml", text }, openTestFile).spec).toBeUndefined();
  });

  test("describes every key for the editor", () => {
    const bare: string[] = [];
    const visit = (schema: unknown, path: string): void => {
      if (typeof schema !== "object" || schema === null) return;
      const { properties = {} } = schema as {
        readonly properties?: Record<string, { description?: string }>;
      };
      for (const [key, inner] of Object.entries(properties))
        if (!inner.description && !["unit", "values", "over", "rows", "columns"].includes(key))
          bare.push(`${path}.${key}`);
      for (const [key, inner] of Object.entries(schema)) visit(inner, `${path}.${key}`);
    };
    visit(jsonSchema(), "");
    expect(bare).toEqual([]);
  });
});
