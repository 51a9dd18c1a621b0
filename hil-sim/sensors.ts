// Sensors: first-order lag, noise, bias, range and steps of the converter; turbo speed from counted pulses.
//   updated exactly every millisecond, outside the plant's differential equations
// (43) lag += (p - lag)(1 - e^(-h/tau));  reading = steps(lag + bias + noise), limited to the range
// (44) phase += om/(2 pi) pulses h;  speed = whole phases passed over a sliding window, per window
// (45) temperatures: lag as (43), steps of stated size
// limits: tau 0 follows at once; a window of w seconds and n pulses reads in steps of 60/(n w) rpm
// source: common practice for lag and converter; counting: definition
import type { PlantSpec, PressureSensorSpec } from "../spec/index.ts";
import { exponential } from "./exact-math.ts";
import { wholeMilliseconds } from "./milliseconds.ts";
import type { PlantState } from "./plant/plant-state.ts";
import { type NormalSource, nextNormal } from "./random.ts";

const RPM_PER_RADIAN = 9.549296585513721;
const REVOLUTIONS_PER_RADIAN = 0.15915494309189535;

interface PressureSensor {
  /** What it is exposed to, Pa. */
  pressure: number;
  lagKpa: number;
  /** Share of the distance covered in 1 ms. */
  readonly follows: number;
  readonly noiseKpa: number;
  readonly biasKpa: number;
  readonly lowKpa: number;
  readonly highKpa: number;
  readonly stepKpa: number;
  readonly stepsPerKpa: number;
  readingKpa: number;
}

interface TemperatureSensor {
  /** What it is exposed to, K. */
  temperature: number;
  lag: number;
  readonly follows: number;
  readonly step: number;
  reading: number;
}

interface SpeedCounter {
  /** Of the rotor, rad/s. */
  speed: number;
  phase: number;
  /** Whole phases at each of the last milliseconds; as long as the window. */
  readonly counts: Float64Array;
  next: number;
  readonly pulsesPerMillisecondAndRadian: number;
  readonly rpmPerCount: number;
  readingRpm: number;
}

/** All sensors of a plant with what they remember. */
export interface Sensors {
  /** All of `boost`, `manifold`, `ambient`; all of `charge`, `inlet`. */
  readonly pressures: readonly PressureSensor[];
  readonly temperatures: readonly TemperatureSensor[];
  readonly boost: PressureSensor;
  readonly manifold: PressureSensor;
  readonly ambient: PressureSensor;
  readonly charge: TemperatureSensor;
  readonly inlet: TemperatureSensor;
  readonly turboSpeed: SpeedCounter;
  readonly engineSpeedStep: number;
  engineSpeedRpm: number;
}

/** Sensors settled at a steady plant: `noiseFactor` multiplies every standard deviation. */
export function settledSensors(
  spec: PlantSpec["sensors"],
  state: PlantState,
  ambientPressure: number,
  noiseFactor: number,
  noise: NormalSource,
): Sensors {
  const boost = pressureSensor(spec.boostPressure, state.boostPressure, noiseFactor);
  const manifold = pressureSensor(spec.manifoldPressure, state.intakePressure, noiseFactor);
  const ambient = pressureSensor(spec.ambientPressure, ambientPressure, noiseFactor);
  const charge = temperatureSensor(spec.chargeTemperature, state.boostTemperature);
  const inlet = temperatureSensor(spec.inletTemperature, state.inletTemperature);
  const sensors: Sensors = {
    pressures: [boost, manifold, ambient],
    temperatures: [charge, inlet],
    boost,
    manifold,
    ambient,
    charge,
    inlet,
    turboSpeed: speedCounter(spec.turboSpeed, state.turboSpeed),
    engineSpeedStep: spec.engineSpeed.step * RPM_PER_RADIAN,
    engineSpeedRpm: 0.5,
  };
  for (let i = 0; i < sensors.turboSpeed.counts.length; i++) countPulses(sensors.turboSpeed);
  updateSensors(sensors, state, noise);
  return sensors;
}

function pressureSensor(spec: PressureSensorSpec, pressure: number, noise: number): PressureSensor {
  let codes = 2;
  for (let bit = 1; bit < spec.bits; bit++) codes *= 2;
  const steps = codes - 1;
  return {
    pressure,
    lagKpa: pressure / 1000,
    follows: followsIn(spec.timeConstant),
    noiseKpa: (spec.noise * noise) / 1000,
    biasKpa: spec.bias / 1000,
    lowKpa: spec.range[0] / 1000,
    highKpa: spec.range[1] / 1000,
    stepKpa: (spec.range[1] - spec.range[0]) / 1000 / steps,
    stepsPerKpa: (1000 * steps) / (spec.range[1] - spec.range[0]),
    readingKpa: 0.5,
  };
}

function temperatureSensor(
  spec: { readonly timeConstant: number; readonly step: number },
  temperature: number,
): TemperatureSensor {
  return {
    temperature,
    lag: temperature,
    follows: followsIn(spec.timeConstant),
    step: spec.step,
    reading: 0.5,
  };
}

function speedCounter(spec: PlantSpec["sensors"]["turboSpeed"], speed: number): SpeedCounter {
  const window = Math.max(1, wholeMilliseconds(spec.window));
  return {
    speed,
    phase: 0.5,
    counts: new Float64Array(window),
    next: 0,
    pulsesPerMillisecondAndRadian: REVOLUTIONS_PER_RADIAN * spec.pulsesPerRevolution * 1e-3,
    rpmPerCount: 60 / (spec.pulsesPerRevolution * window * 1e-3),
    readingRpm: 0.5,
  };
}

function followsIn(timeConstant: number): number {
  return timeConstant <= 0 ? 1 : 1 - exponential(-1e-3 / timeConstant);
}

/** Takes in the plant after a millisecond; ambient pressure stays. */
export function updateSensors(sensors: Sensors, state: PlantState, noise: NormalSource): void {
  sensors.boost.pressure = state.boostPressure;
  sensors.manifold.pressure = state.intakePressure;
  sensors.charge.temperature = state.boostTemperature;
  sensors.inlet.temperature = state.inletTemperature;
  sensors.turboSpeed.speed = state.turboSpeed;
  for (let i = 0; i < sensors.pressures.length; i++) updatePressure(sensors.pressures[i], noise);
  for (let i = 0; i < sensors.temperatures.length; i++) updateTemperature(sensors.temperatures[i]);
  countPulses(sensors.turboSpeed);
  sensors.engineSpeedRpm = inSteps(state.engineSpeed * RPM_PER_RADIAN, sensors.engineSpeedStep);
}

function updatePressure(sensor: PressureSensor, noise: NormalSource): void {
  sensor.lagKpa += (sensor.pressure * 1e-3 - sensor.lagKpa) * sensor.follows;
  let seen = sensor.lagKpa + sensor.biasKpa;
  if (sensor.noiseKpa > 0) seen += sensor.noiseKpa * nextNormal(noise);
  seen = Math.floor((seen - sensor.lowKpa) * sensor.stepsPerKpa + 0.5) * sensor.stepKpa + sensor.lowKpa;
  sensor.readingKpa = seen < sensor.lowKpa ? sensor.lowKpa : Math.min(seen, sensor.highKpa);
}

function updateTemperature(sensor: TemperatureSensor): void {
  sensor.lag += (sensor.temperature - sensor.lag) * sensor.follows;
  sensor.reading = inSteps(sensor.lag, sensor.step);
}

function countPulses(counter: SpeedCounter): void {
  counter.phase += counter.speed * counter.pulsesPerMillisecondAndRadian;
  const count = Math.floor(counter.phase);
  counter.readingRpm = (count - counter.counts[counter.next]) * counter.rpmPerCount;
  counter.counts[counter.next] = count;
  counter.next = counter.next + 1 < counter.counts.length ? counter.next + 1 : 0;
}

/** Nearest multiple of `step`; a step of 0 passes the value on. */
function inSteps(value: number, step: number): number {
  return step > 0 ? Math.floor(value / step + 0.5) * step : value;
}
