import { describe, expect, test } from "vitest";
import { type LoopSpec, readLoopSpec } from "../../spec/index.ts";
import { openTestFile, SMALLEST, testFile } from "./files.ts";

const read = (text: string) => readLoopSpec({ file: "loop.yaml", text }, openTestFile);

function specOf(text: string): LoopSpec {
  const { spec, diagnostics } = read(text);
  if (spec === undefined) throw new Error(diagnostics.map(({ message }) => message).join("\n"));
  return spec;
}

const complete = (): LoopSpec => specOf(testFile("complete.yaml").text);

describe("the complete example of the language", () => {
  test("is accepted without any finding", () => {
    expect(read(testFile("complete.yaml").text).diagnostics).toEqual([]);
  });

  test("comes out in the controller's base units, with the text as written and its place", () => {
    const { target, actuator, overspeedGuard, signals } = complete().controller;
    expect(target.ceiling).toMatchObject({
      value: 245,
      written: "245 kPa abs",
      at: { line: 46, column: 14 },
    });
    expect(actuator.slewOpen).toMatchObject({ value: 9, written: "900 %/s" });
    expect(overspeedGuard?.proportional?.gain.value).toBe(0.0209);
    expect(overspeedGuard?.proportional?.targetReduction.value).toBe(0.004);
    expect(signals.charge_temperature?.range.low.value).toBe(233.15);
    expect(target.airCompensation?.strength.value).toBe(0.8);
  });

  test("gives times as exact fractions of a second", () => {
    const { step, guardStep, overspeedGuard } = complete().controller;
    expect([step.numerator, step.denominator]).toEqual([1n, 200n]);
    expect([guardStep.numerator, guardStep.denominator]).toEqual([1n, 1000n]);
    expect(overspeedGuard?.trip?.after).toMatchObject({ numerator: 1n, denominator: 500n, value: 0.002 });
  });

  test("gives tables row by row and curves with a strictly increasing axis", () => {
    const { target, wastegateArea } = complete().controller;
    expect(target.boost.rows).toEqual([0, 0.2, 0.4, 0.6, 0.8, 1]);
    expect(target.boost.values[5 * 6 + 2]).toBe(240);
    expect(target.reference).toBe("absolute");
    expect(wastegateArea?.axis[1]).toBe(0.05);
    expect(wastegateArea).toMatchObject({ over: "opening", unit: "mm2", axisUnit: "%" });
  });

  test("fills defaults and says so in the same form", () => {
    const { fault } = complete().controller.signals.ambient_pressure ?? {};
    expect(fault?.after).toMatchObject({ value: 0.05, written: "50 ms" });
    expect(fault?.healsAfter.value).toBe(0.5);
    expect(fault?.rateWindow?.value).toBe(0.02);
    expect(fault?.stuckMoved?.value).toBe(5);
    expect(complete().controller.signals.turbo_speed?.fault.rateWindow?.value).toBe(0.01);
  });

  test("gives scenarios with free values, courses and faults", () => {
    const [tipIn, steps, stuck] = complete().scenarios;
    expect(tipIn.engineSpeed).toMatchObject({
      kind: "imposed",
      course: [{ value: { low: 2500, high: 6000 } }],
    });
    expect(tipIn.accelerator[1]).toMatchObject({
      at: { low: 1 },
      value: { low: 0.6, high: 1 },
      over: { high: 0.3 },
    });
    expect(tipIn.ambient.temperature).toMatchObject({ low: 263.15, high: 315.15 });
    expect(tipIn.plantScatter).toEqual({ kind: "set", name: "default" });
    expect(steps).toMatchObject({
      ceilings: false,
      sensorNoise: 1.5,
      plantScatter: { kind: "uniform", ratio: 0.1 },
    });
    expect(steps.target?.[1].value).toMatchObject({ low: 180, high: 240 });
    expect(stuck.engineSpeed).toMatchObject({ kind: "vehicle", from: { low: 5500 } });
    expect(stuck.faults.map(({ kind }) => kind)).toEqual([
      "boost_pressure_stuck",
      "guard_task_delayed",
      "boost_leak",
      "turbo_speed_lost",
    ]);
    expect(stuck.faults[1]).toMatchObject({ from: { low: 0 }, values: { by: { low: 0.2 } } });
    expect(stuck.faults[2]).toMatchObject({ lasting: { low: 0.5 }, values: { area: { low: 0.0003 } } });
    expect(stuck.faults[3]).not.toHaveProperty("lasting");
  });

  test("gives requirements with their scale and whether the target must be reachable", () => {
    const [overspeed, noTrip, overshoot, , rise, , reaction] = complete().requirements;
    expect(overspeed.pattern).toMatchObject({ kind: "stays", holds: { below: 165000, scale: 16500 } });
    expect(noTrip.pattern).toMatchObject({
      holds: { below: 0.5, scale: 0.5 },
      condition: { above: 150, scale: 15 },
    });
    expect(overshoot).toMatchObject({
      onlyIfReachable: true,
      scenarios: ["tip_in"],
      pattern: { atMost: 0.045 },
    });
    expect(rise.onlyIfReachable).toBe(false);
    expect(reaction).toMatchObject({ onlyIfReachable: false, pattern: { within: 0.002, lasting: 0 } });
  });

  test("brings the plant of its neighbour file", () => {
    expect(complete()).toMatchObject({ plantFile: "./engine.plant.yaml", plant: { name: "skarn24" } });
  });
});

describe("the smallest spec", () => {
  test("needs no plant, no scenarios and no guard", () => {
    const { controller, plant, scenarios, requirements } = specOf(SMALLEST);
    expect([plant, scenarios, requirements]).toEqual([undefined, [], []]);
    expect(controller.overspeedGuard).toBeUndefined();
    expect(controller.guardStep).toEqual(controller.step);
    expect(controller.failSafe.torque).toMatchObject({ value: 0.4, written: "40 %" });
  });

  test.each([
    ["unit: kPa gauge", "gauge"],
    ["unit: kPa abs", "absolute"],
  ])("a table with `%s` is a %s target", (unit, reference) => {
    expect(specOf(SMALLEST.replace("unit: kPa abs", unit)).controller.target.reference).toBe(reference);
  });

  test("a table without a unit is a pressure ratio", () => {
    const text = SMALLEST.replace(
      "unit: kPa abs\n      values: [[100, 100], [180, 200]]",
      "values: [[1, 1], [1.8, 2]]",
    );
    expect(specOf(text).controller.target.reference).toBe("pressure_ratio");
  });

  test("gains may be curves over the schedule's signal", () => {
    const curve = '{ over: { engine_speed: [2, 6], unit: krpm }, unit: "%/kPa", values: [40, 20] }';
    const text = SMALLEST.replace("schedule: constant", "schedule: over_engine_speed").replace(
      "0.4 %/kPa",
      curve,
    );
    expect(specOf(text).controller.feedback.proportional).toMatchObject({
      kind: "curve",
      curve: { axis: [2000, 6000], values: [0.4, 0.2] },
    });
  });

  test("the fail-safe torque follows the trip's when it is not given", () => {
    const guard =
      "  overspeed_guard: { limit: 165000 rpm, margin: 3 %, trip: { after: 2 ms, torque: 25 %, release_below: 145000 rpm, release_after: 300 ms, accelerator_below: 10 %, or_after: 3 s } }\n";
    const text = SMALLEST.replace(
      "110 kPa abs }",
      "110 kPa abs }\n    turbo_speed: { range: 0 rpm to 230 krpm }",
    );
    expect(specOf(text + guard).controller.failSafe.torque.value).toBe(0.25);
  });
});

describe("reading goes on after an error", () => {
  test("one run reports every problem, sorted by place, each cause once", () => {
    const text = SMALLEST.replace("step: 5 ms", "step: 5 kPa")
      .replace("ceiling: 245 kPa abs", "ceiling: 245")
      .replace("close: 500", "close: -500")
      .replace("name: boost", "nam: boost");
    const { spec, diagnostics } = read(text);
    expect(spec).toBeUndefined();
    expect(diagnostics.map(({ code, at }) => [code, at.line])).toEqual([
      ["unknown-key", 3],
      ["wrong-unit", 4],
      ["missing-unit", 16],
      ["outside-limits", 25],
    ]);
  });

  test("a broken plant file is reported at its own lines beside the spec's problems", () => {
    const plant = testFile("engine.plant.yaml").text.replace("boost: 10 l", "boost: 10 kg");
    const text = `${SMALLEST.replace("step: 5 ms", "step: 5")}plant: ./engine.plant.yaml\n`;
    const { diagnostics } = readLoopSpec({ file: "loop.yaml", text }, () => ({
      file: "p.yaml",
      text: plant,
    }));
    expect(diagnostics.map(({ code, at }) => [code, at.file])).toEqual([
      ["missing-unit", "loop.yaml"],
      ["wrong-unit", "p.yaml"],
    ]);
  });

  test("an inline plant is read like a file", () => {
    const plant = testFile("engine.plant.yaml").text.split("plant:\n")[1];
    expect(specOf(`${SMALLEST}plant:\n${plant}`).plant?.volumes.boost).toBe(0.01);
    const broken = `${SMALLEST}plant:\n${plant.replace("boost: 10 l", "boost: -10 l")}`;
    expect(read(broken).diagnostics.map(({ code }) => code)).toEqual(["outside-limits"]);
  });
});

describe("the plant's path", () => {
  test.each(["/etc/passwd", "../engine.yaml", "a/../../b.yaml", "C:/x.yaml", "a\\\\b.yaml", "~/x.yaml"])(
    "%s is refused and never opened",
    (path) => {
      const opened: string[] = [];
      const source = { file: "loop.yaml", text: `${SMALLEST}plant: "${path}"\n` };
      const { diagnostics } = readLoopSpec(source, (name) => {
        opened.push(name);
        return undefined;
      });
      expect(opened).toEqual([]);
      expect(diagnostics.map(({ code }) => code)).toEqual(["plant-path-outside"]);
    },
  );
});
