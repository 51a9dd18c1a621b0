import { describe, expect, test } from "vitest";
import {
  campaignMeaningText,
  type LoopSpec,
  meaningText,
  plantMeaningText,
  readLoopSpec,
} from "../../spec/index.ts";
import { openTestFile, testFile } from "./files.ts";

const COMPLETE = testFile("complete.yaml").text;

function specOf(text: string): LoopSpec {
  const { spec } = readLoopSpec({ file: "loop.yaml", text }, openTestFile);
  if (spec === undefined) throw new Error("the spec is refused");
  return spec;
}

const controller = (text: string): string => meaningText(specOf(text));
const campaign = (text: string): string => campaignMeaningText(specOf(text));

describe("the meaning of the controller", () => {
  test.each([
    [
      "comments",
      (text: string) => `# a comment\n${text.replace("# the turbo's mechanical limit", "# another")}`,
    ],
    [
      "layout",
      (text: string) =>
        text.replace(
          "slew: { rise: 900 kPa/s, fall: 1500 kPa/s }",
          "slew:\n      fall: 1500 kPa/s\n      rise: 900 kPa/s",
        ),
    ],
    ["line ends", (text: string) => text.replaceAll("\n", "\r\n")],
    ["the unit a value is written in", (text: string) => text.replace("245 kPa abs", "2.45 bar abs")],
    ["the description", (text: string) => text.replace("(invented)\n", "(quite invented)\n")],
    ["a default written out", (text: string) => text.replace("filter: 8 ms,", "filter: 8 ms, ")],
    ["scenarios", (text: string) => text.replace("duration: 6 s", "duration: 7 s")],
  ])("does not change with %s", (_, change) => {
    expect(change(COMPLETE)).not.toBe(COMPLETE);
    expect(controller(change(COMPLETE))).toBe(controller(COMPLETE));
  });

  test.each([
    ["a gain", "1481 mm2", "1482 mm2"],
    ["a cell of a table", "105, 200, 240, 240, 240, 230", "105, 200, 240, 240, 240, 231"],
    ["a step", "guard_step: 1 ms", "guard_step: 0.5 ms"],
    ["a word", "precision: float32", "precision: float64"],
    ["the name", "name: skarn24_boost", "name: skarn25_boost"],
    ["the last bit of a value", "163 mm2*s", "163.00000000000003 mm2*s"],
  ])("changes with %s", (_, from, to) => {
    expect(COMPLETE.replace(from, to)).not.toBe(COMPLETE);
    expect(controller(COMPLETE.replace(from, to))).not.toBe(controller(COMPLETE));
  });
});

describe("the meaning of what it is tested against", () => {
  test("changes with scenarios, requirements and plant, not with the controller", () => {
    const text = campaign(COMPLETE);
    expect(campaign(COMPLETE.replace("1481 mm2", "1482 mm2"))).toBe(text);
    expect(campaign(COMPLETE.replace("duration: 6 s", "duration: 7 s"))).not.toBe(text);
    expect(campaign(COMPLETE.replace("at_most: 4.5 %", "at_most: 4.6 %"))).not.toBe(text);
    const plant = specOf(COMPLETE).plant;
    expect(plant && text.startsWith(plantMeaningText(plant))).toBe(true);
  });

  test("is one line for each value, with its path", () => {
    const lines = campaign(COMPLETE).trimEnd().split("\n");
    expect(lines).toContain("plant.volumes.boost 0.01");
    expect(lines).toContain('scenarios.0.name "tip_in"');
    expect(new Set(lines).size).toBe(lines.length);
    expect(controller(COMPLETE).split("\n")).toContain("controller.step 1/200 s");
  });
});
