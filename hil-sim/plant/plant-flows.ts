/** Results that one stage of the right-hand side leaves for a later one, and for traces. */
export interface PlantFlows {
  /** kg/s from boost to ambient through the bypass, all turbos. */
  bypass: number;
  /** kg/s from boost to intake. */
  throttle: number;
  /** N·m that one compressor takes. */
  compressorTorque: number;
  /** kg/s out of the engine, all cylinders. */
  engineExhaust: number;
  /** N·m at the crankshaft. */
  engineTorque: number;
}

export function newPlantFlows(): PlantFlows {
  return { bypass: 0.5, throttle: 0.5, compressorTorque: 0.5, engineExhaust: 0.5, engineTorque: 0.5 };
}
