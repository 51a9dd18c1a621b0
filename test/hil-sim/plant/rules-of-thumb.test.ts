// common practice, no source: what engine builders expect of a turbocharged engine of this size.
import { describe, expect, test } from "vitest";
import { heunMillisecond, newHeunMemory } from "../../../hil-sim/integrate/heun-step.ts";
import { newPlantFaults } from "../../../hil-sim/plant/plant-input.ts";
import { type PlantParameters, plantParameters } from "../../../hil-sim/plant/plant-parameters.ts";
import { equilibriumAt } from "../../../hil-sim/steady/equilibrium.ts";
import { openingForBoost } from "../../../hil-sim/steady/opening-for-boost.ts";
import { inputAt } from "../../../hil-sim/steady/operating-point.ts";
import { engineA, engineB } from "../engines.ts";
import { wideOpen } from "../points.ts";

const a = plantParameters(engineA);
const b = plantParameters(engineB);
const KRPM = (1000 * Math.PI) / 30;

/** Seconds from a full accelerator step at throttled cruise, gate shut, to 95 % of a boost. */
function spoolTime(parameters: PlantParameters, rpm: number, throttle: number, boost: number): number {
  const point = wideOpen(rpm);
  const { state } = equilibriumAt(parameters, { ...point, throttle }, 1);
  const memory = newHeunMemory(parameters);
  const input = inputAt(point, 0);
  for (let k = 0; k < 5000; k++) {
    if (state.boostPressure >= 0.95 * boost) return k / 1000;
    heunMillisecond(parameters, state, input, newPlantFaults(), memory);
  }
  return Number.POSITIVE_INFINITY;
}

describe("common practice", () => {
  test("a fully open gate leaves less than 1.5 bar absolute", () => {
    for (let rpm = 1500; rpm <= 7000; rpm += 500) {
      expect(equilibriumAt(a, wideOpen(rpm), 1).state.boostPressure).toBeLessThan(1.5e5);
    }
  });

  test("a closed gate overspeeds the turbo from 3000 rpm up, not at 2500", () => {
    const closed = (rpm: number) => equilibriumAt(a, wideOpen(rpm), 0).state.turboSpeed / KRPM;
    for (let rpm = 3000; rpm <= 7000; rpm += 500) expect(closed(rpm)).toBeGreaterThan(165);
    expect(closed(2500)).toBeLessThan(165);
  });

  test("from throttled cruise at 4000 rpm to 95 % of full boost takes 1.0 to 1.4 s", () => {
    const four = spoolTime(a, 4000, 0.25, 240e3);
    expect(four).toBeGreaterThan(1);
    expect(four).toBeLessThan(1.4);
    const six = spoolTime(b, 4000, 0.25, 220e3);
    expect(six).toBeGreaterThan(0.8);
    expect(six).toBeLessThan(1.3);
  });

  test("spool gets shorter with engine speed", () => {
    const times = [4000, 5000, 6000].map((rpm) => spoolTime(a, rpm, 0.25, 240e3));
    expect(times[0]).toBeGreaterThan(times[1]);
    expect(times[1]).toBeGreaterThan(times[2]);
  });

  test("a day 20 K hotter asks for 5 to 9 % more absolute boost for the same air", () => {
    const airAt = (temperature: number, opening: number) =>
      equilibriumAt(a, { ...wideOpen(5000), ambientTemperature: temperature }, opening).state;
    const cool = openingForBoost(a, { ...wideOpen(5000), ambientTemperature: 293 }, 200e3).state;
    let shut = 0;
    let open = 1;
    for (let i = 0; i < 40; i++) {
      const middle = (shut + open) / 2;
      if (airAt(313, middle).compressorFlow > cool.compressorFlow) shut = middle;
      else open = middle;
    }
    const more = airAt(313, shut).boostPressure / cool.boostPressure - 1;
    expect(more).toBeGreaterThan(0.05);
    expect(more).toBeLessThan(0.09);
  });

  test("the compressor at full boost works at an isentropic efficiency of 0.72 to 0.80", () => {
    for (const rpm of [4000, 5000, 6000, 7000]) {
      const point = wideOpen(rpm);
      const { state } = openingForBoost(a, point, 240e3);
      // Temperature behind the compressor from the Euler work at the flow found.
      const tip = 0.031 * state.turboSpeed;
      const root = Math.sqrt(state.inletTemperature / 298);
      const inlet = 101325 - (8.7e6 * state.compressorFlow ** 2 * 298) / 101325;
      const corrected = (state.compressorFlow * root) / (inlet / 1e5);
      const work = tip * (0.9 * tip - 0.85 * corrected * 500 * root);
      const outlet =
        state.boostPressure +
        (5e7 * state.compressorFlow ** 2 * state.boostTemperature) / state.boostPressure;
      const ideal = 1004.5 * state.inletTemperature * ((outlet / inlet) ** (2 / 7) - 1);
      expect(ideal / work).toBeGreaterThan(0.72);
      expect(ideal / work).toBeLessThan(0.8);
    }
  });

  test("a jammed bypass makes the compressor surge after a lift: several reverse flows a second", () => {
    const point = wideOpen(5000);
    const { state } = openingForBoost(a, point, 240e3);
    const memory = newHeunMemory(a);
    const input = { ...inputAt(point, 0), throttleCommand: 0.02, fuel: 0 };
    let reversals = 0;
    let forward = true;
    for (let k = 0; k < 1800; k++) {
      heunMillisecond(a, state, input, newPlantFaults(), memory);
      if (forward && state.compressorFlow < -0.01) reversals += 1;
      if (state.compressorFlow < -0.01) forward = false;
      if (state.compressorFlow > 0.01) forward = true;
    }
    expect(reversals).toBeGreaterThan(8);
    expect(reversals).toBeLessThan(25);
  });
});
