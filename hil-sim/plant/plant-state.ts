/** The plant's 14 states, SI (symbols: README.md). Per-turbo quantities stand for each of the identical turbos. */
export interface PlantState {
  boostPressure: number;
  intakePressure: number;
  exhaustPressure: number;
  outletPressure: number;
  /** rad/s. */
  turboSpeed: number;
  /** kg/s per turbo; negative in surge. */
  compressorFlow: number;
  boostTemperature: number;
  inletTemperature: number;
  exhaustTemperature: number;
  wallTemperature: number;
  /** 0 closed .. 1 open. */
  wastegateOpening: number;
  bypassOpening: number;
  throttleOpening: number;
  /** rad/s. */
  engineSpeed: number;
}

/** One shape for states and their rates: fields are made as fractions, so that none is ever stored as an integer. */
export function newPlantState(): PlantState {
  return {
    boostPressure: 101325.5,
    intakePressure: 101325.5,
    exhaustPressure: 101325.5,
    outletPressure: 101325.5,
    turboSpeed: 0.5,
    compressorFlow: 0.5,
    boostTemperature: 298.5,
    inletTemperature: 298.5,
    exhaustTemperature: 298.5,
    wallTemperature: 298.5,
    wastegateOpening: 0.5,
    bypassOpening: 0.5,
    throttleOpening: 0.5,
    engineSpeed: 0.5,
  };
}

export const STATE_NAMES = Object.keys(newPlantState()) as readonly (keyof PlantState)[];

export function copyPlantState(from: PlantState, into: PlantState): void {
  into.boostPressure = from.boostPressure;
  into.intakePressure = from.intakePressure;
  into.exhaustPressure = from.exhaustPressure;
  into.outletPressure = from.outletPressure;
  into.turboSpeed = from.turboSpeed;
  into.compressorFlow = from.compressorFlow;
  into.boostTemperature = from.boostTemperature;
  into.inletTemperature = from.inletTemperature;
  into.exhaustTemperature = from.exhaustTemperature;
  into.wallTemperature = from.wallTemperature;
  into.wastegateOpening = from.wastegateOpening;
  into.bypassOpening = from.bypassOpening;
  into.throttleOpening = from.throttleOpening;
  into.engineSpeed = from.engineSpeed;
}
