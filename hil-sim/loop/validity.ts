import type { PlantSpec } from "../../spec/index.ts";
import type { PlantParameters } from "../plant/plant-parameters.ts";
import type { PlantState } from "../plant/plant-state.ts";

/** Where the plant file calls itself valid, as bounds of states at one ambient pressure. */
export interface ValidStates {
  readonly engineSpeedFrom: number;
  readonly engineSpeedTo: number;
  readonly boostFrom: number;
  readonly boostTo: number;
  readonly turboSpeedFrom: number;
  readonly turboSpeedTo: number;
}

export function validStates(
  validity: PlantSpec["validity"],
  parameters: PlantParameters,
  ambientPressure: number,
): ValidStates {
  const { engineSpeed, pressureRatio, tipSpeed } = validity;
  return {
    engineSpeedFrom: engineSpeed[0],
    engineSpeedTo: engineSpeed[1],
    boostFrom: pressureRatio[0] * ambientPressure,
    boostTo: pressureRatio[1] * ambientPressure,
    turboSpeedFrom: tipSpeed[0] / parameters.compressorRadius,
    turboSpeedTo: tipSpeed[1] / parameters.compressorRadius,
  };
}

/** Boost counts as pressure ratio over ambient, the turbo's speed as the compressor's tip speed. */
export function isValid(state: PlantState, valid: ValidStates): boolean {
  return (
    state.engineSpeed >= valid.engineSpeedFrom &&
    state.engineSpeed <= valid.engineSpeedTo &&
    state.boostPressure >= valid.boostFrom &&
    state.boostPressure <= valid.boostTo &&
    state.turboSpeed >= valid.turboSpeedFrom &&
    state.turboSpeed <= valid.turboSpeedTo
  );
}
