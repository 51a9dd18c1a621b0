import { newPlantInput, type PlantInput } from "../../hil-sim/plant/plant-input.ts";
import { newPlantState, type PlantState } from "../../hil-sim/plant/plant-state.ts";

/** Symbols of the reference files to our names. */
export const STATE_SYMBOLS = {
  pb: "boostPressure",
  pim: "intakePressure",
  pem: "exhaustPressure",
  pt: "outletPressure",
  om: "turboSpeed",
  Wc: "compressorFlow",
  Tb: "boostTemperature",
  T1: "inletTemperature",
  Tem: "exhaustTemperature",
  Tw: "wallTemperature",
  xw: "wastegateOpening",
  ab: "bypassOpening",
  al: "throttleOpening",
  we: "engineSpeed",
} as const satisfies Record<string, keyof PlantState>;

export function stateFromSymbols(y: Record<string, number>): PlantState {
  const state = newPlantState();
  for (const [symbol, name] of Object.entries(STATE_SYMBOLS)) state[name] = y[symbol];
  return state;
}

export function inputFromSymbols(u: Record<string, number>): PlantInput {
  return {
    ...newPlantInput(),
    throttleCommand: u.uth,
    wastegateCommand: u.uwg,
    bypassCommand: u.ubp,
    fuel: u.fuel,
    ambientPressure: u.pa,
    ambientTemperature: u.Ta,
    freeVehicle: u.veh,
    engineAcceleration: u.awe,
  };
}
