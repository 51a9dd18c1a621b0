import { readFileSync } from "node:fs";
import { join } from "node:path";
import { beforeAll, describe, expect, test } from "vitest";
import { writeSources } from "../../cli/native/build-native.ts";
import { ARITHMETIC, printC } from "../../generator/index.ts";
import { compileSpec, exampleSpec, runtimeText } from "../agreement/compile-spec.ts";
import { SKARN24 } from "../support/smallest.ts";
import { runIn } from "./native.ts";

// gcc marks every volatile access that its optimiser leaves in the code with {v}; calls are inlined by then or not.

interface Accesses {
  readonly loads: readonly string[];
  readonly stores: readonly string[];
}

const program = compileSpec(exampleSpec(SKARN24), runtimeText());

const accessesOf = (dump: string, name: string): Accesses => {
  const text = dump.split(`;; Function ${name} (`)[1]?.split("\n;; Function ")[0] ?? "";
  const found = (pattern: RegExp) => [...text.matchAll(pattern)].map(([, field]) => field).sort();
  return {
    loads: found(/=\{v\} exchange\w*(?:\(D\))?->(\w+);/g),
    stores: found(/exchange\w*(?:\(D\))?->(\w+) =\{v\}/g),
  };
};

const optimised = async (): Promise<string> => {
  const folder = await writeSources(printC(program));
  try {
    const flags = [...ARITHMETIC, "-O2", "-fdump-tree-optimized=dump.txt", "-c", `${program.name}.c`];
    expect(runIn(folder.path, "gcc", flags)).toEqual({ code: 0, said: "" });
    return readFileSync(join(folder.path, "dump.txt"), "utf8");
  } finally {
    await folder.remove();
  }
};

describe("the exchange between the tasks, in gcc's optimised code", () => {
  let dump = "";
  let slow: Accesses = { loads: [], stores: [] };
  let fast = slow;
  beforeAll(async () => {
    dump = await optimised();
    slow = accessesOf(dump, `${program.name}_step_boost`);
    fast = accessesOf(dump, `${program.name}_step_guard`);
  });
  const repeated = (fields: readonly string[]) => fields.filter((field, i) => fields.indexOf(field) !== i);

  test("each field is loaded once per step", () => {
    expect(slow.loads.length).toBeGreaterThan(0);
    expect(fast.loads.length).toBeGreaterThan(0);
    expect(repeated([...slow.loads])).toEqual([]);
    expect(repeated([...fast.loads])).toEqual([]);
  });
  test("each field is stored once per step, those of the two commit orders once in each branch", () => {
    expect(repeated([...fast.stores])).toEqual([]);
    expect(repeated([...slow.stores])).toEqual(["fail_safe", "wanted_opening_ratio"]);
  });
  test("each field has one writer, and a step reads only what the other writes", () => {
    expect(slow.stores.filter((field) => fast.stores.includes(field))).toEqual([]);
    expect(slow.loads.every((field) => fast.stores.includes(field))).toBe(true);
    expect(fast.loads.every((field) => slow.stores.includes(field))).toBe(true);
  });
  test("the slow step stores nothing before its last block", () => {
    const text = dump.split(`;; Function ${program.name}_step_boost (`)[1].split("\n;; Function ")[0];
    expect(text.lastIndexOf("={v} exchange")).toBeLessThan(text.search(/exchange\w*(?:\(D\))?->\w+ =\{v\}/));
  });
});
