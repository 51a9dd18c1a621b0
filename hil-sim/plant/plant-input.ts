/** What acts on the plant from outside; held over a step. */
export interface PlantInput {
  /** 0..1. */
  throttleCommand: number;
  /** 0 closed .. 1 open. */
  wastegateCommand: number;
  /** 0..1. */
  bypassCommand: number;
  /** 1 fuel, 0 cut. */
  fuel: number;
  /** Pa, K. */
  ambientPressure: number;
  ambientTemperature: number;
  /** 1: the engine's torque moves the vehicle; 0: speed is imposed. */
  freeVehicle: number;
  /** rad/s2, when speed is imposed. */
  engineAcceleration: number;
}

export function newPlantInput(): PlantInput {
  return {
    throttleCommand: 0.5,
    wastegateCommand: 0.5,
    bypassCommand: 0.5,
    fuel: 1,
    ambientPressure: 101325.5,
    ambientTemperature: 298.5,
    freeVehicle: 0,
    engineAcceleration: 0.5,
  };
}

/** Edits of the plant by faults; neutral values leave it as it is. */
export interface PlantFaults {
  /** Boost volume to ambient, m2. */
  boostLeakArea: number;
  /** Exhaust manifold to ambient, m2 per turbo. */
  exhaustLeakArea: number;
  /** Multiplies the air filter's loss. */
  airFilterFactor: number;
  /** Multiplies the turbine's efficiency. */
  turbineEfficiencyFactor: number;
  /** Multiplies the wastegate's speed; 0 stuck. */
  wastegateHealth: number;
}

export function newPlantFaults(): PlantFaults {
  return {
    boostLeakArea: 0,
    exhaustLeakArea: 0,
    airFilterFactor: 1,
    turbineEfficiencyFactor: 1,
    wastegateHealth: 1,
  };
}
