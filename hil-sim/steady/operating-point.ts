import { newPlantFaults, newPlantInput, type PlantFaults, type PlantInput } from "../plant/plant-input.ts";
import { newPlantState, type PlantState } from "../plant/plant-state.ts";

/** Where an equilibrium is sought. */
export interface OperatingPoint {
  /** 0..1. */
  readonly throttle: number;
  readonly bypass: number;
  /** 1 fuel, 0 cut. */
  readonly fuel: number;
  /** rad/s. */
  readonly engineSpeed: number;
  /** Pa, K. */
  readonly ambientPressure: number;
  readonly ambientTemperature: number;
  /** Plant faults in force; absent: none. */
  readonly faults?: PlantFaults;
}

export function inputAt(point: OperatingPoint, opening: number): PlantInput {
  const input = newPlantInput();
  input.throttleCommand = point.throttle;
  input.wastegateCommand = opening;
  input.bypassCommand = point.bypass;
  input.fuel = point.fuel;
  input.ambientPressure = point.ambientPressure;
  input.ambientTemperature = point.ambientTemperature;
  input.freeVehicle = 0;
  input.engineAcceleration = 0;
  return input;
}

export function faultsAt(point: OperatingPoint): PlantFaults {
  return point.faults ?? newPlantFaults();
}

/** A warm engine with an idling turbo: where the search starts, so that it finds what a run from low boost would reach. */
export function idlingTurbo(point: OperatingPoint, opening: number): PlantState {
  const ambient = point.ambientPressure;
  const state = newPlantState();
  state.boostPressure = 1.02 * ambient;
  state.intakePressure = (0.5 + 0.45 * point.throttle) * ambient;
  state.exhaustPressure = 1.06 * ambient;
  state.outletPressure = 1.01 * ambient;
  state.turboSpeed = 4000;
  state.compressorFlow = 0.05;
  state.boostTemperature = point.ambientTemperature + 8;
  state.inletTemperature = point.ambientTemperature;
  state.exhaustTemperature = 1050;
  state.wallTemperature = 850;
  state.wastegateOpening = opening;
  state.bypassOpening = point.bypass;
  state.throttleOpening = point.throttle;
  state.engineSpeed = point.engineSpeed;
  return state;
}
