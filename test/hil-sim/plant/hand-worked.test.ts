// Points worked by hand from the published equations, where the reference files have none: free vehicle speed,
// reverse throttle flow, end stops, load on the gate. Engine A unless said. Each comment is the working.
import { describe, expect, test } from "vitest";
import { heunMillisecond, newHeunMemory } from "../../../hil-sim/integrate/heun-step.ts";
import { derivatives } from "../../../hil-sim/plant/derivatives.ts";
import { engineTorque } from "../../../hil-sim/plant/engine.ts";
import { newPlantFlows } from "../../../hil-sim/plant/plant-flows.ts";
import { newPlantFaults, newPlantInput } from "../../../hil-sim/plant/plant-input.ts";
import { plantParameters } from "../../../hil-sim/plant/plant-parameters.ts";
import { newPlantState } from "../../../hil-sim/plant/plant-state.ts";
import { throttleVelocity } from "../../../hil-sim/plant/throttle.ts";
import { wastegateArea, wastegateVelocity } from "../../../hil-sim/plant/wastegate.ts";
import { equilibriumAt } from "../../../hil-sim/steady/equilibrium.ts";
import { engineA } from "../engines.ts";
import { wideOpen } from "../points.ts";

const a = plantParameters(engineA);

function ratesAt(change: Partial<ReturnType<typeof newPlantState>>, input = newPlantInput()) {
  const state = { ...equilibriumAt(a, wideOpen(4000), 0.3).state, ...change };
  const rates = newPlantState();
  const flows = newPlantFlows();
  derivatives(a, state, input, newPlantFaults(), flows, rates);
  return { state, rates, flows };
}

describe("engine torque", () => {
  test("is indicated minus pumping minus friction", () => {
    // 0.33 · 43e6 · 0.010 / 400 = 354.75; 0.0024 · (200e3 - 240e3) / (4 pi) = -7.6394; 14 + 0.01·400 + 6e-5·160000 = 27.6
    expect(engineTorque(a, 400, 0.01, 240e3, 200e3)).toBeCloseTo(354.75 + 7.6394 - 27.6, 3);
  });

  test("below 10 rad/s divides by 10", () => {
    // 0.33 · 43e6 · 1e-5 / 10 = 14.19; friction 14 + 0.02 + 0.00024
    expect(engineTorque(a, 2, 1e-5, 1e5, 1e5)).toBeCloseTo(14.19 - 14.02024, 5);
  });
});

describe("free vehicle speed", () => {
  test("accelerates by torque minus load over inertia, whatever speed is imposed", () => {
    const input = { ...newPlantInput(), freeVehicle: 1, engineAcceleration: 1e6 };
    const { state, rates, flows } = ratesAt({}, input);
    // load = 30 + 3e-4 · w^2, inertia 1.6
    const load = 30 + 3e-4 * state.engineSpeed * state.engineSpeed;
    expect(rates.engineSpeed).toBeCloseTo((flows.engineTorque - load) / 1.6, 9);
  });

  test("without fuel coasts down", () => {
    const input = { ...newPlantInput(), freeVehicle: 1, fuel: 0, throttleCommand: 0 };
    const { rates } = ratesAt({}, input);
    expect(rates.engineSpeed).toBeLessThan(-30);
  });
});

describe("reverse flow through the throttle", () => {
  test("runs from intake to boost, choked", () => {
    // area 2.2e-5 + 2.6e-3 · 0.25 = 6.72e-4; choked from 200 kPa to 100 kPa at 324 K: 6.72e-4 · 200e3 · 0.0404 / 18 = 0.301653
    const { flows, rates } = ratesAt({
      boostPressure: 100e3,
      intakePressure: 200e3,
      boostTemperature: 324,
      throttleOpening: 0.5,
    });
    expect(flows.throttle).toBeCloseTo(-0.301653, 6);
    expect(rates.intakePressure).toBeLessThan(0);
  });
});

describe("the wastegate", () => {
  test("has the series area of curtain and port", () => {
    // x 0.5: 2 · 0.5 = 1, 1/sqrt(2); 4e-6 + 7e-4 · 0.70710678
    expect(wastegateArea(a, 0.5)).toBeCloseTo(4.989747468e-4, 12);
    expect(wastegateArea(a, 0)).toBe(4e-6);
  });

  test("closes at the servo's rate, limited by the motor's line under load", () => {
    // error -0.06, beyond the dead zone -0.056: -0.056/0.03 = -1.8667; load 0.5: slowest 8·(0.5 - 1) = -4
    expect(wastegateVelocity(a, 1, 0.5, 0.44, 0.5)).toBeCloseTo(-1.866667, 6);
    // full step closing at load 0.5: -4; opening at load 0.2: 8 · 1.2 = 9.6; at load 0.9: 8 · 1.5 = 12
    expect(wastegateVelocity(a, 1, 0.5, 0, 0.9)).toBe(-4);
    expect(wastegateVelocity(a, 1, 0.2, 1, 0.1)).toBeCloseTo(9.6, 12);
    expect(wastegateVelocity(a, 1, 0.9, 1, 0.1)).toBe(12);
  });

  test("is blown open above its stall pressure", () => {
    // load 1.25, command closed: 8 · 0.25 = 2
    expect(wastegateVelocity(a, 1, 1.25, 0, 0)).toBe(2);
  });

  test("rests inside the dead zone and at its stops", () => {
    expect(wastegateVelocity(a, 1, 0, 0.503, 0.5)).toBe(0);
    expect(wastegateVelocity(a, 1, 0, -1, 0)).toBe(0);
    expect(wastegateVelocity(a, 1, 0, 2, 1)).toBe(0);
  });

  test("stuck does not move, slow moves in proportion", () => {
    expect(wastegateVelocity(a, 0, 0, 1, 0.5)).toBe(0);
    expect(wastegateVelocity(a, 1 / 3, 0.5, 0, 0.9)).toBeCloseTo(-4 / 3, 12);
  });

  test("driven hard into either stop stays there and is not counted as a correction", () => {
    const state = equilibriumAt(a, wideOpen(4000), 0.3).state;
    const memory = newHeunMemory(a);
    for (const command of [1, 0, 1, 0]) {
      const input = {
        ...newPlantInput(),
        throttleCommand: 0.3,
        wastegateCommand: command,
        engineAcceleration: 0,
      };
      for (let k = 0; k < 400; k++) {
        heunMillisecond(a, state, input, newPlantFaults(), memory);
        expect(state.wastegateOpening).toBeGreaterThanOrEqual(0);
        expect(state.wastegateOpening).toBeLessThanOrEqual(1);
      }
      expect(Math.abs(state.wastegateOpening - command)).toBeLessThan(0.005);
    }
    expect(memory.counts).toEqual({ clamps: 0, notANumber: 0 });
  });
});

test("the throttle follows at 12 strokes a second at most, both ways", () => {
  // 1/0.04 = 25 per second is asked for, 12 is given; a step of 0.1 asks for 2.5
  expect(throttleVelocity(a, 1, 0)).toBe(12);
  expect(throttleVelocity(a, 0, 1)).toBe(-12);
  expect(throttleVelocity(a, 0.6, 0.5)).toBeCloseTo(2.5, 12);
});
