import { heunMillisecond, newHeunMemory } from "../integrate/heun-step.ts";
import { newPlantFaults, newPlantInput, type PlantInput } from "../plant/plant-input.ts";
import type { PlantParameters } from "../plant/plant-parameters.ts";
import type { PlantState } from "../plant/plant-state.ts";
import { equilibriumAt } from "../steady/equilibrium.ts";
import type { InputRow, OutputRow } from "./input-row.ts";

const RADIAN_PER_RPM = 0.10471975511965977;
const MILLISECONDS_PER_ROW = 10;

export interface OpenLoopResult {
  /** Every 10 ms from time 0 to the last input row. */
  readonly rows: readonly OutputRow[];
  /** False: the first row has no equilibrium (surge); the run starts where the search ended. */
  readonly startedSteady: boolean;
  readonly clamps: number;
  readonly sawNotANumber: boolean;
}

/** The plant alone under a schedule of inputs; starts at the equilibrium of the first row, at time 0. Throws without a row. */
export function simulateOpenLoop(parameters: PlantParameters, schedule: readonly InputRow[]): OpenLoopResult {
  if (schedule.length === 0) throw new Error("an open-loop run needs at least one row of inputs");
  const start = startOf(parameters, schedule[0]);
  const { state } = start;
  const input = newPlantInput();
  const faults = newPlantFaults();
  const memory = newHeunMemory(parameters);
  const rows: OutputRow[] = [];
  const last = Math.floor(schedule[schedule.length - 1].time * 1000 + 1e-6);
  let at = 0;
  for (let k = 0; k <= last; k++) {
    while (at + 1 < schedule.length && schedule[at + 1].time * 1000 <= k + 1e-6) at += 1;
    applyRow(schedule, at, k / 1000, state, input);
    if (k % MILLISECONDS_PER_ROW === 0) {
      rows.push({ time: k / 1000, state: { ...state }, input: { ...input } });
    }
    heunMillisecond(parameters, state, input, faults, memory);
  }
  const { clamps, notANumber } = memory.counts;
  return { rows, startedSteady: start.converged, clamps, sawNotANumber: notANumber > 0 };
}

function startOf(parameters: PlantParameters, row: InputRow) {
  const point = {
    throttle: row.throttleCommand,
    bypass: row.bypassCommand,
    fuel: row.fuel,
    engineSpeed: row.engineSpeedRpm * RADIAN_PER_RPM,
    ambientPressure: row.ambientPressure,
    ambientTemperature: row.ambientTemperature,
  };
  return equilibriumAt(parameters, point, row.wastegateCommand);
}

function applyRow(
  schedule: readonly InputRow[],
  at: number,
  time: number,
  state: PlantState,
  input: PlantInput,
): void {
  const row = schedule[at];
  input.throttleCommand = row.throttleCommand;
  input.wastegateCommand = row.wastegateCommand;
  input.bypassCommand = row.bypassCommand;
  input.fuel = row.fuel;
  input.ambientPressure = row.ambientPressure;
  input.ambientTemperature = row.ambientTemperature;
  input.freeVehicle = 0;
  const slope = speedSlope(row, schedule[at + 1]);
  input.engineAcceleration = slope * RADIAN_PER_RPM;
  state.engineSpeed = (row.engineSpeedRpm + slope * (time - row.time)) * RADIAN_PER_RPM;
}

/** rpm per second until the next row. */
function speedSlope(row: InputRow, next: InputRow | undefined): number {
  return next === undefined ? 0 : (next.engineSpeedRpm - row.engineSpeedRpm) / (next.time - row.time);
}
