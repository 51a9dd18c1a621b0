/** Results inside one evaluation of the right-hand side, kept for the rates and for traces; per turbo where it applies. */
export interface PlantFlows {
  /** kg/s: boost to inlet, boost to intake, boost leak. */
  bypass: number;
  throttle: number;
  boostLeak: number;
  /** kg/s the compressor tends to, and K behind the intercooler. */
  compressorTarget: number;
  cooledTemperature: number;
  /** N·m the compressor takes. */
  compressorTorque: number;
  mixedInletTemperature: number;
  /** kg/s into the engine, out of it (both banks). */
  engineAir: number;
  engineExhaust: number;
  /** K at the port, and behind the wall; W into the wall. */
  portTemperature: number;
  gasTemperature: number;
  wallHeat: number;
  /** N·m at the crankshaft. */
  engineTorque: number;
  /** kg/s, N·m. */
  turbine: number;
  turbineTorque: number;
  wastegate: number;
  exhaustLeak: number;
}

export function newPlantFlows(): PlantFlows {
  return {
    bypass: 0.5,
    throttle: 0.5,
    boostLeak: 0.5,
    compressorTarget: 0.5,
    cooledTemperature: 0.5,
    compressorTorque: 0.5,
    mixedInletTemperature: 0.5,
    engineAir: 0.5,
    engineExhaust: 0.5,
    portTemperature: 0.5,
    gasTemperature: 0.5,
    wallHeat: 0.5,
    engineTorque: 0.5,
    turbine: 0.5,
    turbineTorque: 0.5,
    wastegate: 0.5,
    exhaustLeak: 0.5,
  };
}
