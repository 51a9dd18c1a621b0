import { assert, constantFrom, integer, property, string } from "fast-check";
import { describe, expect, it } from "vitest";
import { drawOfCounterexample } from "../../../verification/counterexample/draw-of-counterexample.ts";
import { readCounterexample } from "../../../verification/counterexample/read-counterexample.ts";
import { writeCounterexample } from "../../../verification/counterexample/write-counterexample.ts";
import { type Draw, drawCorner, drawRun } from "../../../verification/draw.ts";
import { scatterNames } from "../../../verification/scatter.ts";
import { setInSpec } from "../../../verification/set-in-spec.ts";
import { exampleLoop, exampleText } from "../example-loop.ts";

/** The example with one scenario that has free values in every unit. */
const loop = exampleLoop(
  setInSpec(exampleText(), "scenarios.tip_in", {
    duration: "between 5 s and 6 s",
    engine_speed: "between 3500 rpm and 6500 rpm",
    accelerator: [
      { at: "0 s", value: "20 %" },
      { at: "between 900 ms and 1100 ms", value: "between 60 % and 100 %", over: "between 0 ms and 300 ms" },
    ],
    target: "between 1.9 bar abs and 2.4 bar abs",
    ambient: { temperature: "between -10 degC and 42 degC", altitude: "between 0 m and 2500 m" },
    plant_scatter: "default",
    faults: [
      { kind: "boost_leak", area: "between 50 mm2 and 300 mm2", at: "between 1 s and 2 s" },
      { kind: "wastegate_slow", factor: "between 1 and 3" },
    ],
  }),
);
const scenario = loop.scenarios.find(({ name }) => name === "tip_in");
const requirement = loop.requirements.find(({ id }) => id === "tip_in_overshoot");
if (!scenario || !requirement) throw new Error("the example has lost a name that this test uses");
const found = { scenario, requirement, margin: -0.25, hashes: { controller: "ab", plantAndTests: "12" } };
const scatter = scatterNames(scenario.plantScatter).length;

const readBack = (text: string) => {
  const { counterexample, diagnostics } = readCounterexample({ file: "x.yaml", text });
  if (!counterexample) throw new Error(JSON.stringify(diagnostics));
  return drawOfCounterexample(counterexample, loop);
};

describe("a counterexample file", () => {
  it("reads back as the same draw, to the bit", () => {
    const runs = integer({ min: 0, max: 1e6 });
    assert(
      property(runs, constantFrom(drawRun, drawCorner), constantFrom(0, 1), (index, drawn, noise) => {
        const draw: Draw = {
          ...drawn(scenario, scatter, 3, index),
          noise,
          faults: [false, true],
          duration: 2.5,
        };
        const text = writeCounterexample(loop, { ...found, draw });
        const { located, diagnostics } = readBack(text);
        expect(diagnostics).toEqual([]);
        expect(located?.draw).toEqual(draw);
        expect(located?.scenario.name).toBe("tip_in");
        expect(located?.requirement.id).toBe("tip_in_overshoot");
      }),
      { seed: 17 },
    );
  });

  it("shows round values in the units of the spec, and leaves out what is nominal", () => {
    const draw: Draw = {
      values: [5.5, 4800, 1, 0.8, 0.1, 210, 298.15, 1200, 1.5, 1e-4, 2],
      scatter: Array.from({ length: scatter }, (_, k) => (k === 1 ? -0.4 : 0)),
      noise: 0,
      noiseSeed: 77,
      faults: [true, false],
    };
    const text = writeCounterexample(loop, { ...found, draw });
    for (const line of [
      "4800 rpm",
      "80 %",
      "100 ms",
      "2.1 bar abs",
      "25 degC",
      "1200 m",
      "100 mm2",
      "1000 ms",
    ]) {
      expect(text).toContain(`value: ${line} }\n`);
    }
    expect(text).toContain(
      "plant_scatter:\n    - { parameter: turbineEfficiency, share: -0.4 }\n  noise: off\n",
    );
    expect(text).toContain("#   spoolwright replay tip_in_overshoot.tip_in.counterexample.yaml");
    expect(text.split("\n").length).toBeLessThan(40);
  });
});

const draw = drawRun(scenario, scatter, 1, 0);
const good = writeCounterexample(loop, { ...found, draw });

describe("a bad counterexample file", () => {
  it.each([
    ["an empty file", "", "empty-file"],
    ["no YAML", "counterexample: [", "bad-yaml"],
    ["a missing key", good.replace(/ {2}noise_seed.*\n/, ""), "missing-key"],
    ["a misspelt key", good.replace("noise_seed", "noise_sed"), "unknown-key"],
    ["a margin in words", good.replace("margin: -0.25", "margin: bad"), "not-a-number"],
    ["a share beyond its range", good.replace(/share: [^ ]*/, "share: 1.5"), "outside-limits"],
    ["a list where a name is wanted", good.replace("scenario: tip_in", "scenario: [a]"), "wrong-type"],
    ["a path out of the folder is kept as text", good.replace("spec: skarn24.yaml", "spec: 5"), undefined],
    ["a huge file", `${good}${"#".repeat(2_100_000)}`, "file-too-large"],
  ])("%s", (_, text, code) => {
    const { diagnostics, counterexample } = readCounterexample({ file: "x.yaml", text });
    const codes = diagnostics.map((each) => each.code);
    if (code === undefined) expect(counterexample).toBeDefined();
    else expect(codes).toContain(code);
    for (const { at } of diagnostics) expect(at).toMatchObject({ file: "x.yaml", line: expect.any(Number) });
  });

  it.each([
    ["a scenario the spec has not", good.replace("scenario: tip_in", "scenario: tip_inn"), "unknown-word"],
    ["a requirement the spec has not", good.replace("requirement: tip", "requirement: top"), "unknown-word"],
    ["a value that is not free", good.replace("name: engine_speed", "name: engine_sped"), "unknown-word"],
    ["a value in a wrong unit", good.replace(/value: \S* rpm/, "value: 5000 kPa"), "wrong-unit"],
    ["a value outside its range", good.replace(/value: \S* rpm/, "value: 12000 rpm"), "outside-limits"],
    ["an absurd value", good.replace(/value: \S* rpm/, "value: 1e300 rpm"), "not-finite"],
    ["a parameter that is not scattered", good.replace("turbineFlow", "turbineFlw"), "unknown-word"],
    ["a fault that is not there", good.replace("    - 2\n", "    - 9\n"), "outside-limits"],
  ])("%s: a diagnostic at its line", (_, text, code) => {
    const { diagnostics, located } = readBack(text);
    expect(located).toBeUndefined();
    const finding = diagnostics.find((each) => each.code === code);
    if (!finding) throw new Error(JSON.stringify(diagnostics));
    expect(text.split("\n")[finding.at.line - 1].slice(finding.at.column - 1).length).toBeGreaterThan(0);
  });

  it("any text at all gives diagnostics with places, or a counterexample, and never throws", () => {
    const lines = good.split("\n");
    assert(
      property(integer({ min: 0, max: lines.length - 1 }), string({ maxLength: 30 }), (index, junk) => {
        const text = [...lines.slice(0, index), junk, ...lines.slice(index + 1)].join("\n");
        const { counterexample, diagnostics } = readCounterexample({ file: "x.yaml", text });
        const later = counterexample ? drawOfCounterexample(counterexample, loop).diagnostics : [];
        for (const { at } of [...diagnostics, ...later]) expect(at.line).toBeGreaterThan(0);
        expect(counterexample !== undefined || diagnostics.length > 0).toBe(true);
      }),
      { seed: 18, numRuns: 1000 },
    );
  });
});
