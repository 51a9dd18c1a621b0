import { readFileSync } from "node:fs";
import { join } from "node:path";
import { compileProgram, type Lowered, type Program } from "../../../generator/index.ts";

const here = (name: string) => readFileSync(join(import.meta.dirname, name), "utf8");
const runtime = (name: string) => readFileSync(join(import.meta.dirname, "../../../runtime", name), "utf8");

/** The specimen's files as the generator gets them. */
export const specimenText = (): Map<string, string> =>
  new Map([
    ["specimen/types.ts", runtime("types.ts")],
    ["specimen/intrinsics.ts", runtime("intrinsics.ts")],
    ["specimen/structure.ts", here("structure.ts")],
    ["specimen/specimen.ts", here("specimen.ts")],
  ]);

const at = (line: number) => ({ file: "specimen.yaml", line, column: 3, endLine: line, endColumn: 9 });

export const SPECIMEN: Lowered = {
  name: "specimen",
  description: "Every operator and statement once; no controller",
  source: "specimen.yaml",
  precision: "float32",
  structure: { stepS: 0.01, historySteps: 4, shape: "curve", extra: false },
  structureUnits: { stepS: "s", historySteps: "steps" },
  entries: [
    { function: "start", printed: "init", kind: "init", when: "Call once before the first step." },
    { function: "stepSlow", kind: "step", when: "The slow step.", periodS: 0.01 },
    { function: "stepFast", kind: "step", when: "It may interrupt the slow step.", periodS: 0.00125 },
  ],
  roles: {
    Calibration: "calibration",
    State: "state",
    Exchange: "exchange",
    Input: "input",
    Output: "output",
  },
  arraySizes: {
    "Calibration.curve.axis": 3,
    "Calibration.curve.values": 3,
    "Calibration.table.rows": 2,
    "Calibration.table.columns": 2,
    "Calibration.table.values": 4,
    "State.history": 4,
  },
  calibration: {
    curve: { axis: [0, 50, 100], values: [0.1, 7, 12.5] },
    table: { rows: [1, 2], columns: [10, 20], values: [1, 2, 3, 4] },
    limits: { low: -20, high: 300.1 },
    steps: 3,
    armed: true,
    extraGain: 2,
  },
  calibrationInfo: {
    "curve.axis": { unit: "kPa", at: at(7), increasing: true },
    "curve.values": { unit: "kPa", at: at(8) },
    "limits.low": { unit: "kPa", written: "-20 kPa", at: at(9), low: -100, high: 0 },
    "limits.high": {
      unit: "kPa",
      written: "300.1 kPa",
      at: at(10),
      low: 0,
      high: 1000,
      comparisons: [{ is: "above", to: "limits.low" }],
    },
    steps: { unit: "steps of 10 ms", written: "30 ms", at: at(11), low: 0, high: 1000 },
    armed: { unit: "", at: at(12) },
  },
  meaning: "specimen",
  cautions: ["A specimen: it controls nothing."],
};

/** The compiled specimen, with parts of its lowered form changed. */
export const specimenProgram = (changes: Partial<Lowered> = {}): Program => {
  const { program, refusals } = compileProgram({
    runtime: specimenText(),
    lowered: { ...SPECIMEN, ...changes },
  });
  if (program === undefined) {
    throw new Error(
      refusals.map(({ at: { file, line }, message }) => `${file}:${line}: ${message}`).join("\n"),
    );
  }
  return program;
};
