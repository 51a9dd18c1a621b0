import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { readPlant } from "../../spec/index.ts";
import { testFile } from "./files.ts";

const example = (path: string) => {
  const url = new URL(`../../examples/${path}`, import.meta.url);
  return readPlant({ file: path, text: readFileSync(url, "utf8") });
};

describe("the example plants", () => {
  // Values: the parameter table of the plant's design, SI; engine B as engine A times the stated factors.
  test("engine A has its documented parameters to the last bit", () => {
    const { plant, diagnostics } = example("skarn24/skarn24.plant.yaml");
    expect(diagnostics).toEqual([]);
    expect(plant).toMatchObject({
      engine: { displacement: 0.0024, heatingValue: 43e6, friction: [14, 0.01, 6e-5] },
      volumes: { boost: 0.01, intake: 0.006, exhaust: 0.003 },
      losses: { airFilter: 8.7e6, intercooler: 5.0e7, exhaust: 1.0e7 },
      compressor: { tipRadius: 0.031, chokeFlow: [0.14, 0.33, -0.02], mapReference: [298, 1e5] },
      turbine: { flow: 3.4e-5, tipRadius: 0.028 },
      rotor: { inertia: 8.5e-5, friction: 2.0e-6 },
      wastegate: { leakArea: 4e-6, portArea: 7.0e-4, stallPressure: 3.2e5, rate: 8 },
      throttle: { leakArea: 2.2e-5, area: 2.6e-3 },
      bypass: { area: 6.0e-4, timeConstant: 0.02 },
      exhaust: { outletTimeConstant: 0.015, gasTimeConstant: 0.03 },
      vehicle: { load: [30, 3e-4], inertia: 1.6 },
      sensors: { boostPressure: { noise: 400, range: [0, 4e5], bits: 12, timeConstant: 0.008 } },
      validity: { tipSpeed: [0, 560] },
    });
  });

  test("engine B is engine A with the documented factors", () => {
    const a = example("skarn24/skarn24.plant.yaml").plant;
    const b = example("skarn30/skarn30.plant.yaml").plant;
    if (a === undefined || b === undefined) throw new Error("an example plant is refused");
    expect(b.losses.airFilter).toBe(a.losses.airFilter / 0.38);
    expect(b.losses.intercooler).toBe(a.losses.intercooler / 0.38);
    expect(b.losses.exhaust).toBe(a.losses.exhaust / 0.38);
    expect(b.compressor.workSlope).toBe(0.85 / 0.62);
    expect(b.intercooler.effectivenessSlope).toBe(0.45 / 0.58);
    b.compressor.chokeFlow.forEach((flow, i) => {
      expect(flow).toBeCloseTo(0.62 * a.compressor.chokeFlow[i], 15);
    });
    expect(b.turbo.count).toBe(2);
    expect(b.turbo.speedLimit).toBeCloseTo((208000 / 60) * 2 * Math.PI, 10);
  });

  test("every value keeps its place under its dotted path", () => {
    const { plant } = example("skarn24/skarn24.plant.yaml");
    const at = plant?.places.get("turbine.flow");
    const text = readFileSync(new URL("../../examples/skarn24/skarn24.plant.yaml", import.meta.url), "utf8");
    const line = text.split("\n")[(at?.line ?? 0) - 1];
    expect(line.slice((at?.column ?? 0) - 1, (at?.endColumn ?? 0) - 1)).toBe("3.4e-5 kg*K^0.5/(s*Pa)");
    expect(plant?.places.has("sensors.boost_pressure.bits")).toBe(true);
  });
});

test("gauge pressures of a plant are against the standard atmosphere", () => {
  const text = testFile("engine.plant.yaml").text.replace("[298 K, 100 kPa abs]", "[25 degC, 0 kPa gauge]");
  expect(readPlant({ file: "p", text }).plant?.compressor.mapReference).toEqual([298.15, 101325]);
});
