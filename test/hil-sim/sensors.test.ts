import { describe, expect, test } from "vitest";
import { plantParameters } from "../../hil-sim/plant/plant-parameters.ts";
import { normalSource, randomStream } from "../../hil-sim/random.ts";
import { settledSensors, updateSensors } from "../../hil-sim/sensors.ts";
import { equilibriumAt } from "../../hil-sim/steady/equilibrium.ts";
import type { PlantSpec } from "../../spec/plant-spec.ts";
import { engineA } from "./engines.ts";
import { wideOpen } from "./points.ts";

const steady = equilibriumAt(plantParameters(engineA), wideOpen(5000), 0.3).state;

function sensorsOf(change: Partial<PlantSpec["sensors"]> = {}, noiseFactor = 0) {
  const noise = normalSource(randomStream(3, 0));
  const sensors = settledSensors({ ...engineA.sensors, ...change }, steady, 101325, noiseFactor, noise);
  return { sensors, run: (state: typeof steady) => updateSensors(sensors, state, noise) };
}

describe("a pressure sensor", () => {
  test("reads a steady plant to half a step of its converter", () => {
    const { sensors } = sensorsOf();
    expect(Math.abs(sensors.boost.readingKpa - steady.boostPressure / 1000)).toBeLessThan(
      400 / 4095 / 2 + 1e-9,
    );
  });

  test("reads whole steps of range over 4095: 97.7 Pa for 0 to 4 bar and 12 bits", () => {
    const { sensors, run } = sensorsOf({}, 1);
    for (let k = 0; k < 200; k++) {
      run(steady);
      const steps = sensors.boost.readingKpa / (400 / 4095);
      expect(Math.abs(steps - Math.round(steps))).toBeLessThan(1e-9);
    }
  });

  test("follows a step by 1 - 1/e after its time constant", () => {
    // Source: step response of a first-order lag; 0.632121 after one time constant, 8 ms here.
    const fine = { ...engineA.sensors.boostPressure, bits: 24 };
    const { sensors, run } = sensorsOf({ boostPressure: fine });
    const before = steady.boostPressure / 1000;
    for (let k = 0; k < 8; k++) run({ ...steady, boostPressure: steady.boostPressure + 50_000 });
    expect((sensors.boost.readingKpa - before) / 50).toBeCloseTo(0.632121, 5);
  });

  test("stays inside its range and adds its bias", () => {
    const biased = { ...engineA.sensors.boostPressure, bias: 5000 };
    const { sensors, run } = sensorsOf({ boostPressure: biased });
    expect(sensors.boost.readingKpa - steady.boostPressure / 1000).toBeCloseTo(5, 0);
    for (let k = 0; k < 200; k++) run({ ...steady, boostPressure: 7e5 });
    expect(sensors.boost.readingKpa).toBe(400);
  });

  test("has the stated noise, twice that at factor 2, none at 0", () => {
    const spread = (factor: number) => {
      const { sensors, run } = sensorsOf(
        { boostPressure: { ...engineA.sensors.boostPressure, bits: 20 } },
        factor,
      );
      const errors = Array.from({ length: 20_000 }, () => {
        run(steady);
        return sensors.boost.readingKpa * 1000 - steady.boostPressure;
      });
      return Math.sqrt(errors.reduce((sum, x) => sum + x * x, 0) / errors.length);
    };
    expect(spread(1) / 400).toBeCloseTo(1, 1);
    expect(spread(2) / 800).toBeCloseTo(1, 1);
    expect(spread(0)).toBeLessThan(1);
  });
});

describe("the turbo speed sensor", () => {
  const rpm = (steady.turboSpeed * 30) / Math.PI;

  test("counts in steps of 1000 rpm with six pulses and 10 ms, never wrong by more than one", () => {
    const { sensors, run } = sensorsOf();
    let sum = 0;
    for (let k = 0; k < 5000; k++) {
      run(steady);
      const reading = sensors.turboSpeed.readingRpm;
      expect(Math.abs(reading / 1000 - Math.round(reading / 1000))).toBeLessThan(1e-9);
      expect(Math.abs(reading - rpm)).toBeLessThan(1000);
      sum += reading;
    }
    expect(sum / 5000 / rpm).toBeCloseTo(1, 3);
  });

  test("sees a jump of speed whole after its window and in part before", () => {
    const { sensors, run } = sensorsOf();
    const faster = { ...steady, turboSpeed: steady.turboSpeed * 1.2 };
    for (let k = 0; k < 5; k++) run(faster);
    expect(Math.abs(sensors.turboSpeed.readingRpm - 1.1 * rpm)).toBeLessThan(1000);
    for (let k = 0; k < 5; k++) run(faster);
    expect(Math.abs(sensors.turboSpeed.readingRpm - 1.2 * rpm)).toBeLessThan(1000);
  });

  test("with more pulses has finer steps", () => {
    const { sensors } = sensorsOf({ turboSpeed: { pulsesPerRevolution: 60, window: 0.01 } });
    expect(Math.abs(sensors.turboSpeed.readingRpm - rpm)).toBeLessThan(100);
  });
});

test("temperatures lag by seconds and read in half kelvins, engine speed in whole rpm", () => {
  const { sensors, run } = sensorsOf();
  for (let k = 0; k < 3000; k++) run({ ...steady, boostTemperature: steady.boostTemperature + 30 });
  const risen = sensors.charge.reading - steady.boostTemperature;
  expect(Math.abs(risen - 30 * 0.632121)).toBeLessThan(0.3);
  expect(Number.isInteger(sensors.charge.reading * 2)).toBe(true);
  expect(sensors.engineSpeedRpm).toBeCloseTo(5000, 6);
});
