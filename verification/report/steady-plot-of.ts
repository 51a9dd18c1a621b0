import {
  compressorOutletPressure,
  inletPressure,
  type PlantParameters,
  type PlantState,
} from "../../hil-sim/index.ts";
import type { CompressorMap } from "../evidence.ts";
import type { SteadyPlot, SteadyPoint } from "./render-steady-plot.ts";

const RPM = 30 / Math.PI;

/** A settled plant with its bypass closed, and where it was sought. */
export interface SettledPlant {
  readonly engineSpeedRpm: number;
  readonly state: PlantState;
}

/** Pa, K. */
export interface Ambient {
  readonly pressure: number;
  readonly temperature: number;
}

/** (5), (9) and (12) of the plant: flow corrected to the map's reference, ratio from filter to compressor outlet. */
function steadyPoint(parameters: PlantParameters, ambient: Ambient, state: PlantState): SteadyPoint {
  const flow = state.compressorFlow;
  const inlet = inletPressure(parameters.airFilterLoss, flow, ambient.pressure, ambient.temperature);
  const outlet = compressorOutletPressure(parameters, flow, state.boostPressure, state.boostTemperature);
  const rootTheta = Math.sqrt(state.inletTemperature / parameters.mapTemperature);
  return {
    wastegateOpeningRatio: state.wastegateOpening,
    boostPressureKpa: state.boostPressure / 1000,
    turboSpeedRpm: state.turboSpeed * RPM,
    correctedFlowKgS: (flow * rootTheta * parameters.mapPressure) / inlet,
    pressureRatio: outlet / inlet,
  };
}

/** Equilibria as lines of equal engine speed on the compressor map, in the order given. */
export function steadyPlotOf(
  title: string,
  parameters: PlantParameters,
  ambient: Ambient,
  map: CompressorMap,
  equilibria: readonly SettledPlant[],
): SteadyPlot {
  const speeds = [...new Set(equilibria.map(({ engineSpeedRpm }) => engineSpeedRpm))];
  const lines = speeds.map((engineSpeedRpm) => ({
    engineSpeedRpm,
    points: equilibria
      .filter((one) => one.engineSpeedRpm === engineSpeedRpm)
      .map(({ state }) => steadyPoint(parameters, ambient, state)),
  }));
  return { title, map, lines };
}
