import { readFileSync } from "node:fs";
import { expect, test } from "vitest";
import { readLoopSpec } from "../../../spec/index.ts";
import { baseUnit } from "../../../verification/report/base-unit.ts";
import { calibrationEntries } from "../../../verification/report/calibration.ts";

test.each([
  ["%", "ratio"],
  ["bar abs", "kPa abs"],
  ["krpm", "rpm"],
  ["mm2/krpm", "mm2/rpm"],
  ["cm2*ms", "mm2*s"],
  ["%/s", "ratio/s"],
  ["", "1"],
])("a value written in %j is held in %j", (written, held) => {
  expect(baseUnit(written)).toBe(held);
});

test("every number, curve and map of the complete example has its line, in order", () => {
  const read = (file: string) => ({ file, text: readFileSync(file, "utf8") });
  const { spec } = readLoopSpec(read("examples/skarn24/skarn24.yaml"), () =>
    read("examples/skarn24/skarn24.plant.yaml"),
  );
  if (spec === undefined) throw new Error("the complete example does not read");
  const entries = calibrationEntries(spec.controller);
  const lines = entries.map(({ at }) => at.line);
  expect(lines).toEqual(lines.toSorted((a, b) => a - b));
  const text = read(spec.file).text.split("\n");
  for (const path of ["target.ceiling", "overspeed_guard.limit", "target.boost", "feedback.proportional"]) {
    const entry = entries.find((one) => one.path === path);
    expect(entry, path).toBeDefined();
    const key = path.slice(path.indexOf(".") + 1);
    expect(text.slice((entry?.at.line ?? 1) - 3, entry?.at.line).join("\n"), path).toContain(`${key}:`);
  }
});
