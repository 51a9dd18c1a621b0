// The closed loop: plant, sensors, faults and a controller, millisecond by millisecond.
//   at each millisecond: courses and faults, sensor values to the controller, its tasks, the vehicle side, a sample;
//   then the plant moves on by one millisecond and the sensors take it in
import type { PlantSpec } from "../../spec/index.ts";
import type { ControllerPort } from "../controller-port.ts";
import { moveCourse, type ReadyCourse, readyCourse } from "../course.ts";
import type { DrawnScenario } from "../drawn-scenario.ts";
import { applyFaults, type LoopFaults, newLoopFaults } from "../faults.ts";
import { type HeunMemory, heunMillisecond, newHeunMemory } from "../integrate/heun-step.ts";
import { wholeMilliseconds } from "../milliseconds.ts";
import { derivatives } from "../plant/derivatives.ts";
import { newPlantFaults, type PlantFaults, type PlantInput } from "../plant/plant-input.ts";
import type { PlantParameters } from "../plant/plant-parameters.ts";
import { copyPlantState, newPlantState, type PlantState } from "../plant/plant-state.ts";
import { type NormalSource, normalSource, randomStream } from "../random.ts";
import { type Sensors, settledSensors, updateSensors } from "../sensors.ts";
import { inputAt } from "../steady/operating-point.ts";
import { type Trace, traceCapacity } from "../trace.ts";
import { newRecorder, type Recorder, recordSample } from "./record-sample.ts";
import { startOfRun, startPoint } from "./start-of-run.ts";
import { newTaskSchedule, runDueTasks, type TaskSchedule } from "./task-schedule.ts";
import { isValid, type ValidStates, validStates } from "./validity.ts";
import { actOnPlant } from "./vehicle-side.ts";

const RADIAN_PER_RPM = 0.10471975511965977;
/** kPa abs: no other function of the ECU asks for less. */
const NO_CEILING_REQUEST = 1000;

/** A plant made ready for runs. */
export interface LoopPlant {
  readonly parameters: PlantParameters;
  readonly sensors: PlantSpec["sensors"];
  readonly validity: PlantSpec["validity"];
}

export interface LoopStart {
  /** Gate opening of a start without wanted boost, 0..1. */
  readonly restOpening: number;
  /** The start, if the caller kept it from an equal run: what `startOfRun` gave. */
  readonly state?: PlantState;
}

export interface RunSummary {
  /** Milliseconds simulated. */
  readonly milliseconds: number;
  /** States moved back to their bounds; above 0 the run is not to be believed. */
  readonly clamps: number;
  readonly sawNotANumber: boolean;
  /** The run left the range that the plant file calls valid. */
  readonly leftValidity: boolean;
  readonly finalState: PlantState;
}

/** One run of a drawn scenario; fills `trace`. The controller is reset first. Throws if the trace is too short. */
export function runLoop(
  plant: LoopPlant,
  scenario: DrawnScenario,
  port: ControllerPort,
  trace: Trace,
  start: LoopStart,
): RunSummary {
  const milliseconds = wholeMilliseconds(scenario.duration);
  if (traceCapacity(trace) <= milliseconds) throw new Error("the trace is shorter than the scenario");
  const run = newRun(plant, scenario, port, trace, start);
  for (let k = 0; k < milliseconds; k++) {
    decide(run, k);
    advance(run, k);
  }
  decide(run, milliseconds);
  trace.length = milliseconds + 1;
  return {
    milliseconds,
    clamps: run.memory.counts.clamps,
    sawNotANumber: run.memory.counts.notANumber > 0,
    leftValidity: run.leftValidity,
    finalState: run.state,
  };
}

interface Run {
  readonly parameters: PlantParameters;
  readonly valid: ValidStates;
  readonly scenario: DrawnScenario;
  readonly port: ControllerPort;
  readonly state: PlantState;
  readonly input: PlantInput;
  readonly plantFaults: PlantFaults;
  readonly loopFaults: LoopFaults;
  readonly sensors: Sensors;
  readonly noise: NormalSource;
  readonly memory: HeunMemory;
  readonly schedule: TaskSchedule;
  readonly recorder: Recorder;
  readonly accelerator: ReadyCourse;
  readonly speedRpm: ReadyCourse | undefined;
  /** The same one millisecond ahead. */
  readonly nextSpeedRpm: ReadyCourse | undefined;
  readonly targetKpa: ReadyCourse | undefined;
  posedKpa: number;
  /** Millisecond. */
  nextFaultChange: number;
  leftValidity: boolean;
}

function newRun(
  plant: LoopPlant,
  scenario: DrawnScenario,
  port: ControllerPort,
  trace: Trace,
  start: LoopStart,
): Run {
  const { parameters } = plant;
  const point = startPoint(scenario);
  const state = newPlantState();
  copyPlantState(start.state ?? startOfRun(parameters, scenario, start.restOpening), state);
  const { engineSpeed } = scenario;
  const imposed = engineSpeed.kind === "imposed";
  const input = inputAt(point, state.wastegateOpening);
  input.freeVehicle = imposed ? 0 : 1;
  const noise = normalSource(randomStream(scenario.noiseSeed, 0));
  const run: Run = {
    parameters,
    valid: validStates(plant.validity, parameters, point.ambientPressure),
    scenario,
    port,
    state,
    input,
    plantFaults: newPlantFaults(),
    loopFaults: newLoopFaults(),
    sensors: settledSensors(plant.sensors, state, point.ambientPressure, scenario.sensorNoise, noise),
    noise,
    memory: newHeunMemory(parameters),
    schedule: newTaskSchedule(port),
    recorder: newRecorder(trace),
    accelerator: readyCourse(scenario.accelerator),
    speedRpm: imposed ? readyCourse(engineSpeed.course) : undefined,
    nextSpeedRpm: imposed ? readyCourse(engineSpeed.course) : undefined,
    targetKpa: scenario.target === undefined ? undefined : readyCourse(scenario.target),
    posedKpa: Number.NaN,
    nextFaultChange: 0,
    leftValidity: false,
  };
  derivatives(parameters, state, input, run.plantFaults, run.memory.flows, run.memory.rates);
  port.reset();
  if (!scenario.ceilings) port.liftCeilings();
  return run;
}

/** Everything that happens at one instant: faults, target, sensors, controller, vehicle side, sample. */
function decide(run: Run, millisecond: number): void {
  const { port, state } = run;
  if (millisecond >= run.nextFaultChange) changeFaults(run, millisecond);
  if (run.targetKpa !== undefined) poseTarget(run, run.targetKpa, millisecond);
  moveCourse(run.accelerator, millisecond);
  feedController(run);
  runDueTasks(run.schedule, millisecond, run.loopFaults, port);
  actOnPlant(port.input, port.output, state, run.input);
  recordSample(run.recorder, millisecond, state, run.memory.flows, port);
}

/** One millisecond of plant and sensors. */
function advance(run: Run, millisecond: number): void {
  const { state, input } = run;
  imposeSpeed(run, millisecond);
  heunMillisecond(run.parameters, state, input, run.plantFaults, run.memory);
  updateSensors(run.sensors, state, run.noise);
  if (!run.leftValidity) run.leftValidity = !isValid(state, run.valid);
}

function imposeSpeed(run: Run, millisecond: number): void {
  const { speedRpm, nextSpeedRpm } = run;
  if (speedRpm === undefined || nextSpeedRpm === undefined) return;
  moveCourse(speedRpm, millisecond);
  moveCourse(nextSpeedRpm, millisecond + 1);
  run.state.engineSpeed = speedRpm.current * RADIAN_PER_RPM;
  run.input.engineAcceleration = (nextSpeedRpm.current - speedRpm.current) * (1000 * RADIAN_PER_RPM);
}

function poseTarget(run: Run, target: ReadyCourse, millisecond: number): void {
  moveCourse(target, millisecond);
  if (target.current === run.posedKpa) return;
  run.posedKpa = target.current;
  run.port.poseTarget(target.current);
}

function changeFaults(run: Run, millisecond: number): void {
  const time = millisecond / 1000;
  const { loopFaults, sensors } = run;
  const heldKpa = loopFaults.boostStuck ? loopFaults.boostStuckKpa : sensors.boost.readingKpa;
  const heldRpm = loopFaults.turboSpeedStuck ? loopFaults.turboSpeedStuckRpm : sensors.turboSpeed.readingRpm;
  applyFaults(run.scenario.faults, time, loopFaults, run.plantFaults);
  if (Number.isNaN(loopFaults.boostStuckKpa)) loopFaults.boostStuckKpa = heldKpa;
  if (Number.isNaN(loopFaults.turboSpeedStuckRpm)) loopFaults.turboSpeedStuckRpm = heldRpm;
  let next = Number.POSITIVE_INFINITY;
  for (const fault of run.scenario.faults) {
    for (const edge of [fault.from, fault.from + fault.lasting]) {
      if (edge > time && edge < next) next = edge;
    }
  }
  run.nextFaultChange = Math.floor(next * 1000);
}

function feedController(run: Run): void {
  const { sensors, loopFaults } = run;
  const input = run.port.input;
  input.engineSpeedRpm = sensors.engineSpeedRpm;
  input.acceleratorRatio = run.accelerator.current;
  input.boostPressureKpa = loopFaults.boostLost
    ? Number.NaN
    : loopFaults.boostStuck
      ? loopFaults.boostStuckKpa
      : sensors.boost.readingKpa;
  input.ambientPressureKpa = sensors.ambient.readingKpa;
  input.chargeTemperatureK = sensors.charge.reading;
  input.inletTemperatureK = sensors.inlet.reading;
  input.manifoldPressureKpa = sensors.manifold.readingKpa;
  input.boostCeilingRequestKpa = NO_CEILING_REQUEST;
  input.turboSpeedRpm = loopFaults.turboSpeedLost
    ? Number.NaN
    : loopFaults.turboSpeedStuck
      ? loopFaults.turboSpeedStuckRpm
      : sensors.turboSpeed.readingRpm;
}
