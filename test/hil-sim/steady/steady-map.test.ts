import { describe, expect, test } from "vitest";
import { standardPressure } from "../../../hil-sim/exact-math.ts";
import { heunMillisecond, newHeunMemory } from "../../../hil-sim/integrate/heun-step.ts";
import { derivatives } from "../../../hil-sim/plant/derivatives.ts";
import { newPlantFlows } from "../../../hil-sim/plant/plant-flows.ts";
import { newPlantFaults } from "../../../hil-sim/plant/plant-input.ts";
import { plantParameters } from "../../../hil-sim/plant/plant-parameters.ts";
import { newPlantState } from "../../../hil-sim/plant/plant-state.ts";
import { applyScatter, SCATTER_SETS } from "../../../hil-sim/scatter.ts";
import { equilibriumAt } from "../../../hil-sim/steady/equilibrium.ts";
import { openingForBoost, reachableBoost } from "../../../hil-sim/steady/opening-for-boost.ts";
import { idlingTurbo, inputAt } from "../../../hil-sim/steady/operating-point.ts";
import { engineA, engineB } from "../engines.ts";
import { wideOpen } from "../points.ts";
import { referenceTable } from "../reference.ts";

const RPM = Math.PI / 30;
const a = plantParameters(engineA);
const b = plantParameters(engineB);

// Source of the numbers: test/reference/plant/steady-map-a.csv, an independent Python implementation, scipy.
describe("the steady map of engine A", () => {
  test.each(referenceTable("steady-map-a.csv"))(
    "agrees to 0.1 % at $engine_speed_rpm rpm, opening $wastegate_opening_ratio",
    (row) => {
      const { state, converged } = equilibriumAt(
        a,
        wideOpen(row.engine_speed_rpm),
        row.wastegate_opening_ratio,
      );
      expect(converged).toBe(true);
      expect(state.boostPressure / 1000 / row.boost_pressure_kpa).toBeCloseTo(1, 3.3);
      expect(state.turboSpeed / RPM / row.turbo_speed_rpm).toBeCloseTo(1, 3.3);
      expect(state.exhaustPressure / 1000 / row.exhaust_pressure_kpa).toBeCloseTo(1, 3.3);
      expect(state.compressorFlow / row.compressor_flow_kg_s).toBeCloseTo(1, 3.3);
    },
  );
});

describe("an equilibrium", () => {
  const grid = [1500, 2500, 3000, 3500, 5000, 7000].flatMap((rpm) =>
    [0, 0.05, 0.1, 0.3, 1].flatMap((opening) =>
      [0.1, 0.4, 1].map((throttle) => ({ rpm, opening, throttle })),
    ),
  );

  test.each([
    ["A", a],
    ["B", b],
  ])("of engine %s has no rate left and is found without following time", (_name, parameters) => {
    for (const { rpm, opening, throttle } of grid) {
      const point = { ...wideOpen(rpm), throttle };
      const { state, converged, marched } = equilibriumAt(parameters, point, opening);
      const label = `${rpm} rpm, gate ${opening}, throttle ${throttle}`;
      expect(converged, label).toBe(true);
      expect(marched, label).toBe(0);
      const rates = newPlantState();
      derivatives(parameters, state, inputAt(point, opening), newPlantFaults(), newPlantFlows(), rates);
      for (const [name, rate] of Object.entries(rates)) {
        if (name === "wastegateOpening") continue;
        expect(
          Math.abs(rate) / Math.max(1, Math.abs(state[name as keyof typeof state])),
          `${label} ${name}`,
        ).toBeLessThan(1e-5);
      }
    }
  });

  test.each([
    [3000, 0.05],
    [3000, 0.08],
    [3500, 0.1],
    [2500, 0],
  ])(
    "on the steep side of the map, %d rpm and opening %d, is where time leads from low boost",
    (rpm, opening) => {
      const point = wideOpen(rpm);
      const marched = idlingTurbo(point, opening);
      // The wall's heat capacity has no part in an equilibrium; a small one spares minutes of warming up.
      const quickWall = { ...a, wallHeatCapacity: a.wallHeatCapacity / 50 };
      const memory = newHeunMemory(quickWall);
      const input = inputAt(point, opening);
      for (let k = 0; k < 60_000; k++) {
        heunMillisecond(quickWall, marched, input, newPlantFaults(), memory);
        marched.wastegateOpening = opening;
      }
      const { state } = equilibriumAt(a, point, opening);
      expect(marched.boostPressure / state.boostPressure).toBeCloseTo(1, 2.5);
    },
  );
});

describe("on a scattered plant with three equilibria at one opening", () => {
  const draws = [
    0.27, 0.95, -0.28, 0.88, -0.08, 0.74, 0.48, -0.33, -0.19, 0.54, -0.33, -0.63, -0.85, -0.08, 0.14, -0.55,
    0.65, -0.38, 0.06, -0.65, 0.82, 0.56, 0.51,
  ];
  const plant = applyScatter(b, SCATTER_SETS.default, draws);
  const point = { ...wideOpen(2196), ambientPressure: 80e3, ambientTemperature: 262 };

  test("a moved gate holds the middle one, a fixed gate leaves it both ways, as in time", () => {
    const middle = openingForBoost(plant, point, 195e3);
    expect(middle.kind).toBe("held");
    const from = (factor: number) => {
      const start = { ...middle.state, turboSpeed: middle.state.turboSpeed * factor };
      return equilibriumAt(plant, point, middle.opening, start).state.boostPressure;
    };
    expect(from(1.01)).toBeGreaterThan(205e3);
    expect(from(0.99)).toBeLessThan(185e3);
  });
});

describe("the opening for a boost", () => {
  // Source: plant design figures, measured with an independent implementation on engine A at 2.4 bar, 25 degC.
  test.each([
    [4000, 0.182, 122, 187],
    [5000, 0.286, 127, 205],
    [6000, 0.367, 132, 223],
    [7000, 0.417, 137, 238],
  ])("at %d rpm and 240 kPa is %d", (rpm, opening, turboKrpm, exhaustKpa) => {
    const held = openingForBoost(a, { ...wideOpen(rpm), ambientTemperature: 298 }, 240e3);
    expect(held.kind).toBe("held");
    expect(held.opening).toBeCloseTo(opening, 2.7);
    expect(held.state.turboSpeed / RPM / 1000 / turboKrpm).toBeCloseTo(1, 2);
    expect(held.state.exhaustPressure / 1000 / exhaustKpa).toBeCloseTo(1, 2);
  });

  test("gives back the boost of the equilibrium at that opening, up to 2.6 bar", () => {
    for (const parameters of [a, b]) {
      for (let rpm = 2500; rpm <= 7000; rpm += 500) {
        for (const kilopascal of [120, 160, 200, 230, 260]) {
          const point = wideOpen(rpm);
          const held = openingForBoost(parameters, point, kilopascal * 1000);
          if (held.kind !== "held") continue;
          const back = equilibriumAt(parameters, point, held.opening);
          expect(back.state.boostPressure / 1000, `${rpm} rpm`).toBeCloseTo(kilopascal, 2);
        }
      }
    }
  });

  test("out of reach names the nearer end stop and the range", () => {
    const point = wideOpen(2000);
    const above = openingForBoost(a, point, 240e3);
    const below = openingForBoost(a, wideOpen(7000), 120e3);
    expect(above).toMatchObject({ kind: "out of reach", opening: 0 });
    expect(below).toMatchObject({ kind: "out of reach", opening: 1 });
    const range = reachableBoost(a, point);
    if (above.kind === "out of reach") expect(above.reachable).toEqual(range);
    expect(range.highest).toBeLessThan(140e3);
    expect(range.lowest).toBeGreaterThan(standardPressure(0));
  });
});
