import { describe, expect, test } from "vitest";
import { stiffnessBound, substepsPerMillisecond } from "../../../hil-sim/integrate/stiffness.ts";
import { derivatives } from "../../../hil-sim/plant/derivatives.ts";
import { newPlantFlows } from "../../../hil-sim/plant/plant-flows.ts";
import { newPlantFaults } from "../../../hil-sim/plant/plant-input.ts";
import { type PlantParameters, plantParameters } from "../../../hil-sim/plant/plant-parameters.ts";
import { newPlantState, type PlantState, STATE_NAMES } from "../../../hil-sim/plant/plant-state.ts";
import { equilibriumAt } from "../../../hil-sim/steady/equilibrium.ts";
import { inputAt, type OperatingPoint } from "../../../hil-sim/steady/operating-point.ts";
import { engineA, engineB } from "../engines.ts";
import { wideOpen } from "../points.ts";

/** Largest |eigenvalue| of the plant at an equilibrium: power iteration on a numeric Jacobian, scaled states. */
function fastest(parameters: PlantParameters, point: OperatingPoint, opening: number): number {
  const { state } = equilibriumAt(parameters, point, opening);
  const input = inputAt(point, opening);
  const ratesAt = (y: PlantState) => {
    const rates = newPlantState();
    derivatives(parameters, y, input, newPlantFaults(), newPlantFlows(), rates);
    return rates;
  };
  const size = (name: keyof PlantState) => Math.max(Math.abs(state[name]), 0.1);
  const base = ratesAt(state);
  const columns = STATE_NAMES.map((name) => {
    const step = -1e-6 * size(name);
    const moved = ratesAt({ ...state, [name]: state[name] + step });
    return STATE_NAMES.map((row) => ((moved[row] - base[row]) / step) * (size(name) / size(row)));
  });
  let vector = STATE_NAMES.map((_, i) => 1 + 0.1 * i);
  let growth = 0;
  for (let k = 0; k < 400; k++) {
    const next = STATE_NAMES.map((_, row) =>
      columns.reduce((sum, column, j) => sum + column[row] * vector[j], 0),
    );
    growth = Math.hypot(...next) / Math.hypot(...vector);
    const scale = 1 / Math.hypot(...next);
    vector = next.map((x) => x * scale);
  }
  return growth;
}

describe.each([
  ["A", plantParameters(engineA), 1342],
  ["B", plantParameters(engineB), 1247],
])("engine %s", (_name, parameters, measured) => {
  test("has the bound of the design figures, 1.0 to 1.1 of the largest eigenvalue measured on its grid", () => {
    // Source of the eigenvalue: plant design figures, 1932 points, independent implementation.
    expect(stiffnessBound(parameters) / measured).toBeGreaterThanOrEqual(1);
    expect(stiffnessBound(parameters) / measured).toBeLessThan(1.1);
    expect(substepsPerMillisecond(parameters)).toBe(1);
  });

  test("has no faster eigenvalue at the points where the bound is tight", () => {
    const found = [1000, 2000, 4000, 7000].flatMap((rpm) =>
      [0.02, 0.3, 1].flatMap((opening) =>
        [0.3, 1].map((throttle) => fastest(parameters, { ...wideOpen(rpm), throttle }, opening)),
      ),
    );
    expect(Math.max(...found)).toBeLessThanOrEqual(stiffnessBound(parameters) * 1.001);
    expect(Math.max(...found)).toBeGreaterThan(0.75 * stiffnessBound(parameters));
  });
});

test("where the throttle node is the fastest, the bound covers it too", () => {
  const throttleNode = { ...plantParameters(engineA), exhaustVolume: 0.02, boostVolume: 0.004 };
  const found = fastest(throttleNode, wideOpen(1500), 1);
  expect(found).toBeLessThanOrEqual(stiffnessBound(throttleNode) * 1.001);
  expect(found).toBeGreaterThan(0.75 * stiffnessBound(throttleNode));
});

test("a plant of half the volumes takes two steps per millisecond, a lag of 0.2 ms four", () => {
  const a = plantParameters(engineA);
  expect(
    substepsPerMillisecond({ ...a, intakeVolume: 0.003, boostVolume: 0.005, exhaustVolume: 0.0015 }),
  ).toBe(2);
  expect(substepsPerMillisecond({ ...a, flowTimeConstant: 2e-4 })).toBe(4);
});
