import { describe, expect, test } from "vitest";
import {
  compileProgram,
  type Lowered,
  type Program,
  printC,
  printTypeScript,
} from "../../generator/index.ts";
import { eachExpressionOf } from "../../generator/ir/walk.ts";
import { SPECIMEN, specimenProgram, specimenText } from "./specimen/lowered.ts";

const codeOf = (program: Program): string => printC(program).get(`${program.name}.c`) ?? "";
const headerOf = (program: Program): string => printC(program).get(`${program.name}.h`) ?? "";
const fieldsOf = (program: Program, struct: string): readonly string[] =>
  program.structs.find(({ name }) => name === struct)?.fields.map(({ name }) => name) ?? [];

/** The specimen with some of its text replaced. */
const changed = (from: string, to: string, changes: Partial<Lowered> = {}): Program => {
  const text = specimenText();
  const original = text.get("specimen/specimen.ts") ?? "";
  expect(original).toContain(from);
  text.set("specimen/specimen.ts", original.replace(from, to));
  const { program, refusals } = compileProgram({ runtime: text, lowered: { ...SPECIMEN, ...changes } });
  if (program === undefined) throw new Error(refusals.map(({ message }) => message).join("\n"));
  return program;
};

const COUNT_LINE = "  output.count = busy ? counted : whole;\n";

describe("the structure shapes the code", () => {
  const structure = (changes: Partial<Lowered["structure"]>): Program =>
    specimenProgram({ structure: { ...SPECIMEN.structure, ...changes } as Lowered["structure"] });

  test("a branch that is not chosen leaves nothing behind, neither code nor calibration", () => {
    const program = specimenProgram();
    expect(fieldsOf(program, "Calibration")).toEqual([
      "curve.axis",
      "curve.values",
      "limits",
      "steps",
      "armed",
    ]);
    expect(codeOf(program)).not.toMatch(/extra_gain|table_values/);
  });
  test("a chosen branch is there without a test on the choice", () => {
    const program = structure({ extra: true, shape: "table" });
    expect(fieldsOf(program, "Calibration")).toEqual([
      "table.rows",
      "table.values",
      "limits",
      "steps",
      "armed",
      "extraGain",
    ]);
    expect(codeOf(program)).toContain("calibration->table_values[1] * calibration->table_rows[0]");
    expect(codeOf(program)).not.toMatch(/\bshape\b|structure/);
  });
  test("a function that only a dropped branch called is dropped", () => {
    expect(codeOf(specimenProgram())).toContain("look(");
    expect(codeOf(structure({ shape: "table" }))).not.toContain("look(");
  });
  test("state that nothing reads is dropped with its writes", () => {
    expect(fieldsOf(specimenProgram(), "State")).toEqual(["inner", "phase", "history", "next"]);
    expect(codeOf(specimenProgram())).not.toContain("unread");
  });
  test("a choice of numbers prints as one named constant, rounded once", () => {
    expect(codeOf(specimenProgram())).toContain("#define STEP_S (0x1.47ae14p-7f) /* 0.01 s */");
    expect(codeOf(specimenProgram({ precision: "float64" }))).toContain(
      "#define STEP_S (0x1.47ae147ae147bp-7) /* 0.01 s */",
    );
  });
});

describe("folding", () => {
  test("folds operations on constants only, each rounded to float32", () => {
    const program = changed(COUNT_LINE, `${COUNT_LINE}  output.resultKpa = raw * (GAIN * 3);\n`);
    // fround(fround(0.1) * 3) is 0x1.333334p-2; 0.1 * 3 rounded once would be 0x1.333334p-2 or its neighbour by luck
    expect(Math.fround(Math.fround(0.1) * 3)).toBe(0x1333334 * 2 ** -26);
    expect(codeOf(program)).toContain("raw * 0x1.333334p-2f");
  });
  test.each(["raw + 0", "raw * 1", "raw - raw", "0 * raw", "raw / 1"])(
    "%s stays: it changes -0 or NaN",
    (text) => {
      const program = changed(COUNT_LINE, `${COUNT_LINE}  output.resultKpa = ${text};\n`);
      const [a, sign, b] = text.split(" ");
      const printed = (part: string) => (part === "raw" ? "raw" : `${part}.0f`);
      expect(codeOf(program)).toContain(`result_kpa = ${printed(a)} ${sign} ${printed(b)};`);
    },
  );
  test("a negated comparison is never turned round", () => {
    const program = changed(COUNT_LINE, `${COUNT_LINE}  output.flag = !(raw < 3);\n`);
    expect(codeOf(program)).toContain("output->flag = !(raw < 3.0f);");
  });
  test("operators keep the written order", () => {
    const program = changed(COUNT_LINE, `${COUNT_LINE}  output.resultKpa = raw + (result + looked) + raw;\n`);
    expect(codeOf(program)).toContain("(raw + (result + looked)) + raw");
    expect(printTypeScript(program)).toContain("f(f(raw + f(result + looked)) + raw)");
  });
});

describe("where code came from", () => {
  test("every expression names its runtime line, and a calibration its line in the spec", () => {
    const program = specimenProgram();
    const specLines = new Set<number>();
    for (const definition of program.functions) {
      eachExpressionOf(definition, ({ origin }) => {
        expect(origin.runtime.line).toBeGreaterThan(0);
        if (origin.spec !== undefined) specLines.add(origin.spec.line);
      });
    }
    expect([...specLines].sort((a, b) => a - b)).toEqual([9, 10, 11, 12]);
  });
  test("sentences above a statement stand above it in the C", () => {
    expect(codeOf(specimenProgram())).toContain(
      "    /* the root of the distance, and its sign turned */\n    const float root",
    );
  });
});

describe("the contract in the header", () => {
  test("exchange fields are volatile, what a step only reads is const", () => {
    const header = headerOf(specimenProgram());
    expect(header).toContain("    volatile float level;");
    expect(header).toContain(
      "void specimen_step_fast(const specimen_state_t *state, specimen_exchange_t *exchange);",
    );
  });
  test("each exchange field is loaded or stored once per step in the text of the step", () => {
    const step = codeOf(specimenProgram()).split("void specimen_step_slow(")[1].split("\n}\n")[0];
    expect(step.match(/exchange->/g)).toHaveLength(1);
  });
});
