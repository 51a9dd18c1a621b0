import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { kitFiles, printC } from "../../generator/index.ts";
import { compileSpec, exampleSpec, runtimeText } from "../agreement/compile-spec.ts";
import { specimenProgram } from "../generator/specimen/lowered.ts";
import { SKARN24, SMALLEST } from "../support/smallest.ts";
import { expectSameTree } from "./expect-same-tree.ts";

const only = (files: ReadonlyMap<string, string>, ...endings: readonly string[]) =>
  new Map([...files].filter(([name]) => endings.some((ending) => name.endsWith(ending))));

/** The C of an example without the hash of its values: they change with every tuning, the code does not. */
const codeOf = (file: string, ...endings: readonly string[]) => {
  const program = compileSpec(exampleSpec(file), runtimeText());
  const files = only(printC(program), ...endings);
  return new Map([...files].map(([name, text]) => [name, text.replace(program.meaning, "HASH")]));
};

describe("printed text", () => {
  test("specimen: every file of the kit", () => {
    expectSameTree("specimen", kitFiles(specimenProgram()));
  });
  test("skarn-smallest: the C code", () => expectSameTree("skarn-smallest", codeOf(SMALLEST, "t.c", ".h")));
  test("skarn24: the C code", () => expectSameTree("skarn24", codeOf(SKARN24, "t.c")));
});

describe("committed generated text", () => {
  test("stays short enough to be reviewed", () => {
    const cases = readdirSync(import.meta.dirname, { withFileTypes: true }).filter((each) => each.isDirectory());
    const lines = cases.flatMap(({ name }) =>
      readdirSync(join(import.meta.dirname, name)).map(
        (file) => readFileSync(join(import.meta.dirname, name, file), "utf8").split("\n").length,
      ),
    );
    expect(lines.reduce((sum, each) => sum + each, 0)).toBeLessThanOrEqual(3000);
  });
});
