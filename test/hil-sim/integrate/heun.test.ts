import { describe, expect, test } from "vitest";
import { heunMillisecond, newHeunMemory } from "../../../hil-sim/integrate/heun-step.ts";
import { limitState, newStepCounts } from "../../../hil-sim/integrate/limit-state.ts";
import { newPlantFaults, newPlantInput } from "../../../hil-sim/plant/plant-input.ts";
import { type PlantParameters, plantParameters } from "../../../hil-sim/plant/plant-parameters.ts";
import { newPlantState, type PlantState, STATE_NAMES } from "../../../hil-sim/plant/plant-state.ts";
import { nextUniform, randomStream } from "../../../hil-sim/random.ts";
import { equilibriumAt } from "../../../hil-sim/steady/equilibrium.ts";
import { inputAt } from "../../../hil-sim/steady/operating-point.ts";
import { engineA, engineB } from "../engines.ts";
import { wideOpen } from "../points.ts";

const a = plantParameters(engineA);

/** Boost every 10 ms of a tip-in with part gate and a lift, in `parts` steps per millisecond. */
function manoeuvre(parts: number): PlantState[] {
  const point = wideOpen(4000);
  const { state } = equilibriumAt(a, { ...point, throttle: 0.25 }, 1);
  const memory = { ...newHeunMemory(a), step: 1e-3 / parts, stepsPerMillisecond: parts };
  const input = inputAt(point, 1);
  const seen: PlantState[] = [];
  for (let k = 0; k < 3000; k++) {
    input.throttleCommand = k < 200 ? 0.25 : k < 2500 ? 1 : 0.05;
    input.wastegateCommand = k < 200 ? 1 : k < 1300 ? 0 : 0.25;
    input.bypassCommand = k < 2500 ? 0 : 0.5;
    heunMillisecond(a, state, input, newPlantFaults(), memory);
    if (k % 10 === 9) seen.push({ ...state });
  }
  return seen;
}

describe("Heun's method at 1 ms", () => {
  const fine = manoeuvre(8);
  const error = (parts: number, name: keyof PlantState) =>
    Math.max(...manoeuvre(parts).map((state, k) => Math.abs(state[name] / fine[k][name] - 1)));

  test("is within 0.1 % of boost and 0.01 % of turbo speed of an eight times finer step", () => {
    expect(error(1, "boostPressure")).toBeLessThan(1e-3);
    expect(error(1, "turboSpeed")).toBeLessThan(1e-4);
  });

  test("converges with second order: half the step, about a quarter of the error", () => {
    // Source: order 2 of the explicit trapezium (Hairer, Norsett & Wanner, from memory); kinks of the plant cost some.
    const whole = error(1, "turboSpeed");
    const half = error(2, "turboSpeed");
    expect(whole / half).toBeGreaterThan(2.5);
    expect(whole / half).toBeLessThan(7);
  });
});

describe("a hostile run", () => {
  const steps = Number(process.env.HOSTILE_STEPS ?? 100_000);

  test(`of ${steps} steps per engine with absurd inputs, states and parameters holds no NaN`, () => {
    for (const [index, spec] of [engineA, engineB].entries()) {
      const random = randomStream(99, index);
      const between = (low: number, high: number) => low + (high - low) * nextUniform(random);
      let parameters: PlantParameters = plantParameters(spec);
      let memory = newHeunMemory(parameters);
      const state = newPlantState();
      const input = newPlantInput();
      const faults = newPlantFaults();
      for (let k = 0; k < steps; k++) {
        if (k % 500 === 0) {
          parameters = plantParameters(spec);
          for (const name of Object.keys(parameters) as (keyof PlantParameters)[]) {
            if (name !== "turboCount") parameters[name] *= between(0.6, 1.6);
          }
          // A plant file cannot say more than 1 here.
          parameters.turbineLinearAbove = Math.min(parameters.turbineLinearAbove, 0.99);
          parameters.tangentFrom = Math.min(parameters.tangentFrom, 0.99);
          memory = newHeunMemory(parameters);
          for (const name of STATE_NAMES) state[name] = between(-1, 2) * 3 * newPlantState()[name];
          limitState(state, newStepCounts());
        }
        if (k % 50 === 0) {
          Object.assign(input, {
            throttleCommand: between(-2, 3),
            wastegateCommand: between(-2, 3),
            bypassCommand: between(-2, 3),
            fuel: between(0, 1) < 0.5 ? 0 : 1,
            ambientPressure: between(4e4, 1.1e5),
            ambientTemperature: between(220, 330),
            freeVehicle: between(0, 1) < 0.5 ? 0 : 1,
            engineAcceleration: between(-3000, 3000),
          });
          faults.boostLeakArea = between(0, 1) < 0.5 ? 0 : between(0, 5e-4);
          faults.exhaustLeakArea = between(0, 1) < 0.5 ? 0 : between(0, 2e-4);
        }
        heunMillisecond(parameters, state, input, faults, memory);
        expectAllFinite(state, k);
        if (memory.counts.notANumber > 0) expect.fail(`step ${k} made a NaN`);
      }
    }
  });

  test("a state that is not a number goes to its lower bound and is counted", () => {
    const state = { ...equilibriumAt(a, wideOpen(4000), 0.3).state, boostPressure: Number.NaN };
    const memory = newHeunMemory(a);
    heunMillisecond(a, state, newPlantInput(), newPlantFaults(), memory);
    expectAllFinite(state, 0);
    expect(state.boostPressure).toBe(2e3);
    expect(memory.counts.notANumber).toBeGreaterThan(0);
  });
});

function expectAllFinite(state: PlantState, step: number): void {
  for (const name of STATE_NAMES) {
    if (!Number.isFinite(state[name])) expect.fail(`${name} is ${state[name]} after step ${step}`);
  }
}
