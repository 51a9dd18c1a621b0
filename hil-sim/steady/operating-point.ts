import { newPlantFaults, newPlantInput, type PlantFaults, type PlantInput } from "../plant/plant-input.ts";
import type { PlantState } from "../plant/plant-state.ts";
import { newPlantState } from "../plant/plant-state.ts";

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
  return {
    ...newPlantInput(),
    throttleCommand: point.throttle,
    wastegateCommand: opening,
    bypassCommand: point.bypass,
    fuel: point.fuel,
    ambientPressure: point.ambientPressure,
    ambientTemperature: point.ambientTemperature,
    freeVehicle: 0,
    engineAcceleration: 0,
  };
}

export function faultsAt(point: OperatingPoint): PlantFaults {
  return point.faults ?? newPlantFaults();
}

/** A warm engine with an idling turbo: where the search starts, so that it finds what a run from low boost would reach. */
export function idlingTurbo(point: OperatingPoint, opening: number): PlantState {
  const ambient = point.ambientPressure;
  return {
    ...newPlantState(),
    boostPressure: 1.02 * ambient,
    intakePressure: (0.5 + 0.45 * point.throttle) * ambient,
    exhaustPressure: 1.06 * ambient,
    outletPressure: 1.01 * ambient,
    turboSpeed: 4000,
    compressorFlow: 0.05,
    boostTemperature: point.ambientTemperature + 8,
    inletTemperature: point.ambientTemperature,
    exhaustTemperature: 1050,
    wallTemperature: 850,
    wastegateOpening: opening,
    bypassOpening: point.bypass,
    throttleOpening: point.throttle,
    engineSpeed: point.engineSpeed,
  };
}
