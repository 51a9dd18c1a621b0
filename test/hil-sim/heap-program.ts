// Prints the bytes that one simulated millisecond leaves on the heap. Run by heap.test.ts with `node --expose-gc`.
import { heunMillisecond, newHeunMemory } from "../../hil-sim/integrate/heun-step.ts";
import { runLoop } from "../../hil-sim/loop/run-loop.ts";
import { newPlantFaults } from "../../hil-sim/plant/plant-input.ts";
import { plantParameters } from "../../hil-sim/plant/plant-parameters.ts";
import { normalSource, randomStream } from "../../hil-sim/random.ts";
import { settledSensors, updateSensors } from "../../hil-sim/sensors.ts";
import { equilibriumAt } from "../../hil-sim/steady/equilibrium.ts";
import { inputAt } from "../../hil-sim/steady/operating-point.ts";
import { newTrace } from "../../hil-sim/trace.ts";
import { engineA } from "./engines.ts";
import { wideOpen } from "./points.ts";
import { fixedPort } from "./ports.ts";
import { plantOf, pull } from "./scenarios.ts";

const collectGarbage = globalThis.gc ?? (() => process.exit(2));

const MILLISECONDS = 20_000;

/** Bytes that `work` leaves per millisecond, least of many tries: on a busy machine the compiler comes late, and allocates too. */
function bytesLeft(work: () => void): number {
  let least = Number.POSITIVE_INFINITY;
  for (let tries = 0; tries < 60 && least > 3; tries++) {
    collectGarbage();
    const before = process.memoryUsage().heapUsed;
    work();
    least = Math.min(least, (process.memoryUsage().heapUsed - before) / MILLISECONDS);
  }
  return least;
}

const parameters = plantParameters(engineA);
const point = wideOpen(5000);
const { state } = equilibriumAt(parameters, point, 0.3);
const input = inputAt(point, 0.2);
const faults = newPlantFaults();
const memory = newHeunMemory(parameters);
const noise = normalSource(randomStream(1, 0));
const sensors = settledSensors(engineA.sensors, state, point.ambientPressure, 1, noise);

const plant = bytesLeft(() => {
  for (let k = 0; k < MILLISECONDS; k++) heunMillisecond(parameters, state, input, faults, memory);
});
const sensed = bytesLeft(() => {
  for (let k = 0; k < MILLISECONDS; k++) updateSensors(sensors, state, noise);
});

const loopPlant = plantOf(engineA);
const port = { ...fixedPort({ wastegateCommandRatio: 0.3 }), stepGuard: () => {}, stepBoost: () => {} };
const trace = newTrace(["boost_pressure", "turbo_speed", "boost_wanted"], 25);
const scenario = pull({ duration: MILLISECONDS / 1000, sensorNoise: 1 });
const start = { restOpening: 1, state };
const loop = bytesLeft(() => runLoop(loopPlant, scenario, port, trace, start));

console.log(JSON.stringify({ plant, sensors: sensed, loop }));
