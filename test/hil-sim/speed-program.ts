// Prints simulated seconds per wall second, best of many short pieces: plant under a PI, and the whole loop with
// sensor noise, a 2 ms guard and a small PI. For people and benchmarks; no test depends on it.
import { heunMillisecond, newHeunMemory } from "../../hil-sim/integrate/heun-step.ts";
import { runLoop } from "../../hil-sim/loop/run-loop.ts";
import { startOfRun } from "../../hil-sim/loop/start-of-run.ts";
import { newPlantFaults } from "../../hil-sim/plant/plant-input.ts";
import { plantParameters } from "../../hil-sim/plant/plant-parameters.ts";
import { equilibriumAt, equilibriumHolding } from "../../hil-sim/steady/equilibrium.ts";
import { inputAt } from "../../hil-sim/steady/operating-point.ts";
import { newTrace } from "../../hil-sim/trace.ts";
import { engineA } from "./engines.ts";
import { wideOpen } from "./points.ts";
import { plainPort } from "./ports.ts";
import { plantOf, pull } from "./scenarios.ts";

const PIECES = Number(process.argv[2] ?? 2000);

/** Least wall seconds of many runs of `work`. */
function leastSeconds(work: () => void): number {
  let least = Number.POSITIVE_INFINITY;
  for (let i = 0; i < PIECES; i++) {
    const start = performance.now();
    work();
    least = Math.min(least, performance.now() - start);
  }
  return least / 1000;
}

const parameters = plantParameters(engineA);
const point = wideOpen(5000);
const { state } = equilibriumAt(parameters, point, 0.3);
const input = inputAt(point, 0.2);
const faults = newPlantFaults();
const memory = newHeunMemory(parameters);
const held = { integral: 0.25 };

const plantAlone = leastSeconds(() => {
  for (let k = 0; k < 1000; k++) {
    if (k % 5 === 0) {
      const error = state.boostPressure - 2e5;
      held.integral = Math.min(Math.max(held.integral + 1e-9 * error, 0), 1);
      input.wastegateCommand = Math.min(Math.max(held.integral + 1e-6 * error, 0), 1);
    }
    heunMillisecond(parameters, state, input, faults, memory);
  }
});

const plant = plantOf(engineA);
const port = plainPort(160_000);
const target = [
  { at: 0, value: 160, over: 0 },
  { at: 0.3, value: 220, over: 0 },
];
const scenario = pull({ duration: 1, sensorNoise: 1, target });
const start = { restOpening: 1, state: startOfRun(parameters, scenario, 1) };
const trace = newTrace(
  ["boost_pressure", "boost_wanted", "turbo_speed", "wastegate_opening", "torque_limit"],
  1,
);
const wholeLoop = leastSeconds(() => runLoop(plant, scenario, port, trace, start));
const steady = leastSeconds(() => equilibriumAt(parameters, point, 0.3));
const opening = leastSeconds(() => equilibriumHolding(parameters, point, 200e3));

console.log(
  JSON.stringify({
    plantSecondsPerSecond: Math.round(1 / plantAlone),
    loopSecondsPerSecond: Math.round(1 / wholeLoop),
    equilibriumMicroseconds: Math.round(steady * 1e6),
    openingForBoostMicroseconds: Math.round(opening * 1e6),
  }),
);
