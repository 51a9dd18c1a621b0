// Intercooler: effectiveness falling with flow; pressure loss lumped at the compressor outlet.
//   T2 K compressor outlet    Tic K cooler outlet    W kg/s compressor flow    kic loss
// (15) eps = clip(eps0 - eps1 W, 0.3, 1);  Tic = T2 - eps (T2 - Ta - dTc)
// (9)  p2 = pb + kic W |W| Tb / pb
// limits: eps = 1 gives ambient plus the coolant's rise; no flow gives p2 = pb
// source: effectiveness form, Eriksson & Nielsen 2014 (from memory)
import type { PlantParameters } from "./plant-parameters.ts";

/** Temperature K behind the cooler. */
export function cooledTemperature(
  parameters: PlantParameters,
  flow: number,
  outletTemperature: number,
  ambientTemperature: number,
): number {
  const raw = parameters.intercoolerEffectiveness - parameters.intercoolerEffectivenessSlope * flow;
  const effectiveness = raw < 0.3 ? 0.3 : Math.min(raw, 1);
  return (
    outletTemperature - effectiveness * (outletTemperature - ambientTemperature - parameters.coolantRise)
  );
}

/** Pressure Pa at the compressor outlet. */
export function compressorOutletPressure(
  parameters: PlantParameters,
  flow: number,
  boostPressure: number,
  boostTemperature: number,
): number {
  return (
    boostPressure + (parameters.intercoolerLoss * flow * Math.abs(flow) * boostTemperature) / boostPressure
  );
}
