import type { PlantInput } from "../plant/plant-input.ts";
import type { PlantState } from "../plant/plant-state.ts";

/** One row of an open-loop schedule: commands and surroundings hold from `time` on, engine speed runs linearly to the next row. */
export interface InputRow {
  /** Seconds. */
  readonly time: number;
  readonly throttleCommand: number;
  readonly wastegateCommand: number;
  readonly bypassCommand: number;
  /** 1 fuel, 0 cut. */
  readonly fuel: number;
  /** Pa, K. */
  readonly ambientPressure: number;
  readonly ambientTemperature: number;
  readonly engineSpeedRpm: number;
}

/** One row of the result: the plant at `time` and the input that held up to it. */
export interface OutputRow {
  readonly time: number;
  readonly state: Readonly<PlantState>;
  readonly input: Readonly<PlantInput>;
}
