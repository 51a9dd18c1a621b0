import type { ControllerSpec, Span } from "../../../spec/index.ts";
import type { ReportContext } from "../../../verification/report/index.ts";

const at = (line: number): Span => ({ file: "skarn24.yaml", line, column: 3, endLine: line, endColumn: 9 });

/** The parts of a controller that a calibration table has to tell apart: numbers, a gain, a curve, a table. */
const controller = {
  name: "skarn24",
  step: { value: 0.005, written: "5 ms", numerator: 1n, denominator: 200n, at: at(12) },
  target: {
    boost: {
      rowsOver: "accelerator",
      rows: [0.2, 1],
      rowsUnit: "%",
      columnsOver: "engine_speed",
      columns: [2000, 4000, 6000],
      columnsUnit: "rpm",
      values: [110, 115, 120, 180, 240, 238],
      unit: "bar abs",
      at: at(30),
    },
    ceiling: { value: 245, written: "245 kPa abs", at: at(41) },
    at: at(29),
  },
  wastegateArea: {
    over: "opening",
    axis: [0, 0.5, 1],
    values: [4, 480, 630],
    unit: "mm2",
    axisUnit: "ratio",
    at: at(52),
  },
  feedback: {
    proportional: { kind: "number", quantity: { value: 1481, written: "1481 mm2", at: at(60) } },
    at: at(58),
  },
  at: at(1),
} as unknown as ControllerSpec;

export function sampleContext(): ReportContext {
  return {
    spec: { file: "skarn24.yaml", controller, scenarios: [], requirements: [] },
    files: [
      { path: "skarn24.c", bytes: 21_433, sha256: "0f".repeat(32) },
      { path: "skarn24.h", bytes: 6120, sha256: "1e".repeat(32) },
    ],
    agreement: {
      targets: [
        { name: "generated TypeScript, float32", steps: 1_000_000, differing: 0 },
        { name: "gcc -O2, float32", steps: 1_000_000, differing: 0 },
        { name: "gcc -O3, float32", steps: 1_000_000, differing: 3 },
      ],
      notRun: [{ name: "clang -O2, float32", why: "clang is not installed" }],
    },
  };
}
