// Equilibrium by pseudo-transient continuation: linearised implicit Euler steps whose length grows from
// milliseconds to infinity, where they are Newton steps.
//   y  states that settle (ten), and the gate's opening x when a boost is to be held
//   (I/dt - J) dy = f(y),  J by forward differences
//   dt grows while a step changes no state by much, shrinks when it does, and shrinks while det(I/dt - J) <= 0:
//   such a step would run against the flow of time, towards an equilibrium that no run would stay at.
//   A held boost adds x' = 0.1/s (pb - p_wanted)/bar, at its end stops x' = 0 outwards.
// limits: dt -> 0 follows the plant in time; dt -> infinity converges quadratically near the solution
// source: Kelley & Keyes, Convergence analysis of pseudo-transient continuation, SIAM J. Numer. Anal. 1998 (from memory)
import { heunMillisecond, newHeunMemory } from "../integrate/heun-step.ts";
import { limitState } from "../integrate/limit-state.ts";
import { derivatives } from "../plant/derivatives.ts";
import type { PlantParameters } from "../plant/plant-parameters.ts";
import { copyPlantState, newPlantState, type PlantState } from "../plant/plant-state.ts";
import { solveLinear } from "./linear-solve.ts";
import { faultsAt, idlingTurbo, inputAt, type OperatingPoint } from "./operating-point.ts";

export interface Equilibrium {
  readonly state: PlantState;
  /** N·m at the crankshaft. */
  readonly engineTorque: number;
  /** False: no equilibrium was found, as in surge; `state` is where the search ended. */
  readonly converged: boolean;
  /** Linearised steps taken. */
  readonly steps: number;
  /** Plain time steps of 1 ms taken when the continuation stalled. */
  readonly marched: number;
}

/** Sizes of the unknowns, in the order of `readUnknowns`. */
const SIZES = Float64Array.of(1e5, 1e5, 1e5, 1e5, 1e4, 0.2, 300, 300, 1000, 1000, 1);
const STATES = 10;
const MOST_STEPS = 200;
/** Largest change of a state in one step, as a share of its size. */
const LARGEST_CHANGE = 0.25;
const LONGEST = 1e9;

/** Equilibrium with the gate fixed at `opening`. */
export function equilibriumAt(
  parameters: PlantParameters,
  point: OperatingPoint,
  opening: number,
  from: PlantState = idlingTurbo(point, opening),
): Equilibrium {
  const state = newPlantState();
  copyPlantState(from, state);
  state.wastegateOpening = opening;
  return settle(parameters, point, state, undefined);
}

/** Equilibrium with the gate moved until boost is `boost` Pa, or to an end stop if that is out of reach. */
export function equilibriumHolding(
  parameters: PlantParameters,
  point: OperatingPoint,
  boost: number,
): Equilibrium {
  return settle(parameters, point, idlingTurbo(point, 0.2), boost);
}

function settle(
  parameters: PlantParameters,
  point: OperatingPoint,
  state: PlantState,
  heldBoost: number | undefined,
): Equilibrium {
  const search = newSearch(parameters, point, heldBoost);
  let converged = continueFrom(search, state);
  let marched = 0;
  while (!converged && marched < 8000) {
    march(search, state, 2000);
    marched += 2000;
    converged = continueFrom(search, state);
  }
  derivatives(parameters, state, search.input, search.faults, search.memory.flows, search.memory.rates);
  return {
    state,
    engineTorque: search.memory.flows.engineTorque,
    converged,
    steps: search.steps,
    marched,
  };
}

type Search = ReturnType<typeof newSearch>;

function newSearch(parameters: PlantParameters, point: OperatingPoint, heldBoost: number | undefined) {
  const unknowns = heldBoost === undefined ? STATES : STATES + 1;
  return {
    parameters,
    input: inputAt(point, 0.5),
    faults: faultsAt(point),
    heldBoost: heldBoost ?? 0,
    unknowns,
    now: new Float64Array(unknowns),
    slope: new Float64Array(unknowns),
    moved: new Float64Array(unknowns),
    change: new Float64Array(unknowns),
    jacobian: new Float64Array(unknowns * unknowns),
    matrix: new Float64Array(unknowns * unknowns),
    trial: newPlantState(),
    memory: newHeunMemory(parameters),
    steps: 0,
  };
}

/** Continuation in place; true when settled. */
function continueFrom(search: Search, state: PlantState): boolean {
  const { now, slope, change, unknowns } = search;
  let dt = 0.02;
  const last = search.steps + MOST_STEPS;
  while (search.steps < last) {
    search.steps += 1;
    readUnknowns(state, now, unknowns);
    slopes(search, state, slope);
    jacobian(search, state);
    dt = solveForChange(search, dt);
    const size = largest(change);
    if (!(size < 1e9)) return false;
    const share = size > LARGEST_CHANGE ? LARGEST_CHANGE / size : 1;
    for (let i = 0; i < unknowns; i++) now[i] += share * change[i];
    writeUnknowns(now, state, unknowns);
    limitState(state, search.memory.counts);
    if (size < 1e-9 && dt > 1e6) return true;
    dt = nextLength(dt, size);
  }
  return false;
}

function nextLength(dt: number, size: number): number {
  if (size > LARGEST_CHANGE) return 0.5 * dt;
  const growth = 0.1 / (size + 1e-9);
  return Math.min(dt * (growth < 0.5 ? 0.5 : Math.min(growth, 20)), LONGEST);
}

/** Solves for `change`, shortening the step until it runs with time; returns its length. */
function solveForChange(search: Search, wanted: number): number {
  const { jacobian: slopes, matrix, change, slope, unknowns } = search;
  let dt = wanted;
  for (let tries = 0; tries < 60; tries++) {
    for (let i = 0; i < matrix.length; i++) matrix[i] = -slopes[i];
    for (let i = 0; i < unknowns; i++) {
      matrix[i * unknowns + i] += 1 / dt;
      change[i] = slope[i];
    }
    if (solveLinear(matrix, change, unknowns) > 0) return dt;
    dt *= 0.5;
  }
  return dt;
}

/** Slopes of the scaled unknowns, 1/s. */
function slopes(search: Search, state: PlantState, into: Float64Array): void {
  const { rates, flows } = search.memory;
  derivatives(search.parameters, state, search.input, search.faults, flows, rates);
  rates.wastegateOpening = 1e-6 * (state.boostPressure - search.heldBoost);
  const x = state.wastegateOpening;
  if ((x <= 0 && rates.wastegateOpening < 0) || (x >= 1 && rates.wastegateOpening > 0)) {
    rates.wastegateOpening = 0;
  }
  readUnknowns(rates, into, search.unknowns);
}

function jacobian(search: Search, state: PlantState): void {
  const { now, slope, moved, jacobian: into, trial, unknowns } = search;
  const h = 1e-7;
  copyPlantState(state, trial);
  for (let column = 0; column < unknowns; column++) {
    const kept = now[column];
    now[column] = kept + h;
    writeUnknowns(now, trial, unknowns);
    slopes(search, trial, moved);
    now[column] = kept;
    for (let row = 0; row < unknowns; row++) {
      into[row * unknowns + column] = (moved[row] - slope[row]) / h;
    }
  }
}

/** Follows the plant itself in time. */
function march(search: Search, state: PlantState, milliseconds: number): void {
  const { parameters, input, faults, memory } = search;
  for (let i = 0; i < milliseconds; i++) {
    if (search.unknowns > STATES) {
      const moved = state.wastegateOpening + 1e-9 * (state.boostPressure - search.heldBoost);
      state.wastegateOpening = moved < 0 ? 0 : Math.min(moved, 1);
    }
    input.wastegateCommand = state.wastegateOpening;
    heunMillisecond(parameters, state, input, faults, memory);
  }
}

function largest(values: Float64Array): number {
  let most = 0;
  for (let i = 0; i < values.length; i++) {
    const size = Math.abs(values[i]);
    if (!(size <= most)) most = size;
  }
  return most;
}

function readUnknowns(state: PlantState, into: Float64Array, unknowns: number): void {
  into[0] = state.boostPressure / SIZES[0];
  into[1] = state.intakePressure / SIZES[1];
  into[2] = state.exhaustPressure / SIZES[2];
  into[3] = state.outletPressure / SIZES[3];
  into[4] = state.turboSpeed / SIZES[4];
  into[5] = state.compressorFlow / SIZES[5];
  into[6] = state.boostTemperature / SIZES[6];
  into[7] = state.inletTemperature / SIZES[7];
  into[8] = state.exhaustTemperature / SIZES[8];
  into[9] = state.wallTemperature / SIZES[9];
  if (unknowns > STATES) into[10] = state.wastegateOpening;
}

function writeUnknowns(from: Float64Array, state: PlantState, unknowns: number): void {
  state.boostPressure = from[0] * SIZES[0];
  state.intakePressure = from[1] * SIZES[1];
  state.exhaustPressure = from[2] * SIZES[2];
  state.outletPressure = from[3] * SIZES[3];
  state.turboSpeed = from[4] * SIZES[4];
  state.compressorFlow = from[5] * SIZES[5];
  state.boostTemperature = from[6] * SIZES[6];
  state.inletTemperature = from[7] * SIZES[7];
  state.exhaustTemperature = from[8] * SIZES[8];
  state.wallTemperature = from[9] * SIZES[9];
  if (unknowns > STATES) state.wastegateOpening = from[10];
}
