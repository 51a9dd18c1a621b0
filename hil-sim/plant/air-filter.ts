// Air filter: quadratic loss, inlet mixing with the bypass's warm air.
//   Wf  kg/s  flow through the filter, per turbo      p1  Pa  compressor inlet pressure
//   T1q K     temperature of the mixture that the inlet tends to
// (5)  Wf = Wc - Wbp/nt;  p1 = max(pa - kf Wf |Wf| Ta / pa, pa/2)
// (16) T1q = (wa Ta + wb Tb)/(wa + wb),  wa = max(Wf, 0) + w0,  wb = max(Wbp/nt, 0)
// limits: no flow gives ambient pressure; a closed bypass gives ambient temperature
// source: quadratic flow loss, Eriksson & Nielsen 2014 (from memory); the floor at pa/2 is our own
import type { PlantParameters } from "./plant-parameters.ts";

/** Compressor inlet pressure Pa from the filter's flow kg/s; `loss` is kf, faults included. */
export function inletPressure(
  loss: number,
  flow: number,
  ambientPressure: number,
  ambientTemperature: number,
): number {
  const pressure = ambientPressure - (loss * flow * Math.abs(flow) * ambientTemperature) / ambientPressure;
  const floor = 0.5 * ambientPressure;
  return Math.max(pressure, floor);
}

/** Temperature K of air through the filter mixed with recirculated air, flows per turbo. */
export function mixedInletTemperature(
  parameters: PlantParameters,
  filterFlow: number,
  bypassFlow: number,
  ambientTemperature: number,
  boostTemperature: number,
): number {
  const fresh = Math.max(filterFlow, 0) + parameters.mixingFlow;
  const warm = Math.max(bypassFlow, 0);
  return (fresh * ambientTemperature + warm * boostTemperature) / (fresh + warm);
}
