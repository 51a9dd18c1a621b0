import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { type AgreementSubject, agree, prepareAgreement } from "../../cli/native/agree.ts";
import { NATIVE_BUILDS } from "../../cli/native/builds.ts";
import {
  firstDifference,
  layoutOf,
  type Precision,
  type Program,
  printC,
  printHarness,
} from "../../generator/index.ts";
import { specimenProgram } from "../generator/specimen/lowered.ts";
import { SKARN24, SMALLEST } from "../support/smallest.ts";
import { cannotUse } from "../support/tool.ts";
import { compileSpec, exampleSpec, runtimeText } from "./compile-spec.ts";

const builds = NATIVE_BUILDS.filter(({ compiler }) => compiler === "gcc" || !cannotUse("clang"));

const example = (file: string, precision: Precision) => () =>
  compileSpec(exampleSpec(file), runtimeText(), precision);

describe.each([
  ["the specimen at float32", () => specimenProgram()],
  ["the specimen at float64", () => specimenProgram({ precision: "float64" })],
  ["the smallest example at float32", example(SMALLEST, "float32")],
  ["the smallest example at float64", example(SMALLEST, "float64")],
  ["the complete example at float32", example(SKARN24, "float32")],
  ["the complete example at float64", example(SKARN24, "float64")],
] as const)("%s", (_, make) => {
  let subject: AgreementSubject | undefined;
  beforeAll(async () => {
    subject = await prepareAgreement(make(), builds);
  }, 300_000);
  afterAll(() => subject?.remove());

  test.each([0, 0.1])("every target agrees, share of extreme calibration values %f", async (extreme) => {
    if (subject === undefined) throw new Error("not prepared");
    const results = await agree(subject, { seed: 11, frames: 6000, extreme }, "interpreter");
    expect(results).toHaveLength(2 + builds.length);
    for (const result of results) {
      expect(result.difference, result.target).toBeUndefined();
      expect(Math.min(result.fastSteps, result.slowSteps), result.target).toBeGreaterThan(5000);
    }
  });
});

describe("a target that does something else is found", () => {
  const program = compileSpec(exampleSpec(SMALLEST), runtimeText());
  const gcc = builds.slice(0, 1);

  const changed = async (from: RegExp, to: string, frames = 2000) => {
    const subject = await prepareAgreement(
      program,
      gcc,
      (files) => new Map([...files].map(([name, text]) => [name, text.replace(from, to)])),
    );
    try {
      const results = await agree(subject, { seed: 3, frames, extreme: 0 }, "interpreter");
      return results[results.length - 1].difference;
    } finally {
      await subject.remove();
    }
  };

  test("one changed operation in the C", async () => {
    expect(
      (await changed(/previous - \(fall_per_s \* step_s\)/, "previous + (fall_per_s * step_s)"))?.frame,
    ).toMatch(/^frame /);
  });
  test("a constant one bit off", async () => {
    expect(await changed(/0x1\.47ae14p-7f/, "0x1.47ae16p-7f")).toBeDefined();
  });
  test("a target that skips steps", async () => {
    expect(await changed(/if \(run & 2\) \{ .* slow\+\+; \}/, "")).toBeDefined();
  });
  test("a recording that is cut short", () => {
    const words = {
      bytes: new Uint8Array(8),
      setReal: () => undefined,
      setWhole: () => undefined,
      real: () => 0,
      whole: () => 0,
    };
    expect(firstDifference(layoutOf(program), 100, { words }, new Uint8Array(8))?.signal).toBe(
      "length of the recording",
    );
  });
  test("the harness writes every output, state and exchange field", () => {
    const harness = printHarness(program);
    const fields = printC(program)
      .get(`${program.name}.h`)
      ?.match(/\bwanted_opening_ratio;/g);
    expect(fields?.length).toBeGreaterThan(0);
    for (const { field, struct } of writtenFields(program)) {
      expect(harness, `${struct}.${field}`).toContain(field);
    }
  });
});

const writtenFields = (program: Program) =>
  program.structs
    .filter(({ role }) => role === "output" || role === "exchange" || role === "state")
    .flatMap((struct) => layoutOf(program).structs.filter(({ name }) => name === struct.name))
    .flatMap(({ name, fields }) => fields.map(({ printed }) => ({ struct: name, field: printed })));
