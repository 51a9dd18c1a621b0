// Closed loop, simulated seconds per wall second, one thread, generated float32 controller, all sensors with noise.
import {
  COMPLETE,
  generatedController,
  hilSim,
  least,
  readLoop,
  SMALLEST,
  secondsOf,
  verification,
} from "./built.mjs";

const SECONDS = 5;
const REPEATS = 400;

/** A tip-in at a held engine speed, drawn by hand so that both examples run the same manoeuvre. */
export const TIP_IN = {
  name: "tip_in",
  duration: SECONDS,
  engineSpeed: { kind: "imposed", course: [{ at: 0, value: 4500, over: 0 }] },
  accelerator: [
    { at: 0, value: 0.2, over: 0 },
    { at: 1, value: 1, over: 0 },
  ],
  ceilings: true,
  ambient: { temperature: 298.15, altitude: 0 },
  sensorNoise: 1,
  faults: [],
  noiseSeed: 1,
};

const plantOf = ({ plant }) => ({
  parameters: hilSim.plantParameters(plant),
  sensors: plant.sensors,
  validity: plant.validity,
});

/** Runs the manoeuvre again and again from one kept start. */
function speedOf(plant, port, restOpening) {
  const trace = hilSim.newTrace(["boost_pressure", "boost_wanted", "turbo_speed"], SECONDS);
  const state = hilSim.startOfRun(plant.parameters, TIP_IN, restOpening);
  const run = () => hilSim.runLoop(plant, TIP_IN, port, trace, { restOpening, state });
  for (let i = 0; i < 10; i++) run();
  return SECONDS / least(Array.from({ length: REPEATS }, () => secondsOf(run)));
}

export async function loopSpeeds() {
  const complete = readLoop(COMPLETE);
  const plant = plantOf(complete);
  const result = {};
  for (const [name, loop] of [
    ["smallest", readLoop(SMALLEST)],
    ["complete", complete],
  ]) {
    const port = await verification.loadController(generatedController(loop), loop);
    result[name] = speedOf(plant, port, loop.controller.actuator.restOpening.value);
  }
  return result;
}

/** Seconds on one thread for 1000 judged runs of the complete example's 5 s scenario, steady starts included. */
export async function verificationSeconds() {
  const loop = readLoop(COMPLETE);
  const scenario = loop.scenarios.findIndex(
    ({ duration }) => duration.low === SECONDS && duration.high === SECONDS,
  );
  const port = await verification.loadController(generatedController(loop), loop);
  const run = verification.batchRunner(loop, port, 1);
  run({ scenario, kind: "random", from: 0, count: 20 });
  const seconds = secondsOf(() => run({ scenario, kind: "random", from: 0, count: 1000 }));
  return { scenario: loop.scenarios[scenario].name, seconds };
}
