import {
  chokeFlow,
  compressorOutletPressure,
  inletPressure,
  type PlantParameters,
  peakFlow,
  type Trace,
  usableHead,
} from "../hil-sim/index.ts";
import type { CompressorMap, MapPoint, WorstTrace } from "./evidence.ts";
import { recorded } from "./patterns/recorded.ts";

const RADIAN_PER_RPM = 0.10471975511965977;
/** Points on the forward branch of a speed line. */
const POINTS = 24;
const LINES = 9;

/** The static map of one turbo as lines: equal steps of speed up to the speed limit and one step beyond. */
export function compressorMap(parameters: PlantParameters): CompressorMap {
  const limitRpm = parameters.turboSpeedLimit / RADIAN_PER_RPM;
  const stepRpm = Math.ceil(limitRpm / (LINES - 1) / 5000) * 5000;
  const speeds = Array.from({ length: LINES }, (_, k) => (k + 1) * stepRpm).filter(
    (rpm) => rpm < limitRpm + stepRpm,
  );
  const lines = speeds.map((rpm) => ({ correctedSpeedRpm: rpm, points: speedLine(parameters, rpm) }));
  return {
    speedLines: lines,
    surge: lines.map(({ points }) => points[0]),
    choke: lines.map(({ points }) => points[points.length - 1]),
  };
}

/** From the zero-slope point (surge) to choke, at the map's reference temperature. */
function speedLine(parameters: PlantParameters, rpm: number): MapPoint[] {
  const tipSpeed = parameters.compressorRadius * rpm * RADIAN_PER_RPM;
  const ratio = tipSpeed / parameters.referenceTipSpeed;
  const head = usableHead(parameters, tipSpeed, ratio, parameters.mapTemperature);
  const peak = powerSevenHalves(1 + parameters.peakHead * head);
  const choke = parameters.chokePressureRatioBase + parameters.chokePressureRatioQuadratic * ratio * ratio;
  const from = peakFlow(parameters, ratio);
  const to = chokeFlow(parameters, ratio);
  return Array.from({ length: POINTS }, (_, k) => {
    // The quarter circle q² + height² = 1 by its rational parameter: even steps along it, steep ends included.
    const t = k / (POINTS - 1);
    const q = (2 * t) / (1 + t * t);
    const height = (1 - t * t) / (1 + t * t);
    return [significant(from + (to - from) * q), significant(choke + height * (peak - choke))] as const;
  });
}

/** Charge warmer than ambient by this, K: traces do not hold its temperature; 20 K off moves the ratio by 0.2 %. */
const CHARGE_RISE = 30;

/** Corrected flow and pressure ratio of one turbo along a trace, at the samples asked for. */
export function operatingTrack(
  parameters: PlantParameters,
  ambient: { readonly pressure: number; readonly temperature: number },
  trace: Trace,
  samples: readonly number[],
): WorstTrace["operating"] {
  const flows = recorded(trace, "compressor_flow");
  const boosts = recorded(trace, "boost_pressure");
  const points = samples.map((k): MapPoint => {
    const flow = flows[k];
    const inlet = inletPressure(parameters.airFilterLoss, flow, ambient.pressure, ambient.temperature);
    const charge = ambient.temperature + CHARGE_RISE;
    const outlet = compressorOutletPressure(parameters, flow, boosts[k] * 1000, charge);
    const rootTheta = Math.sqrt(ambient.temperature / parameters.mapTemperature);
    return [(flow * rootTheta * parameters.mapPressure) / inlet, outlet / inlet];
  });
  return {
    correctedFlowKgS: points.map(([flow]) => significant(flow)),
    pressureRatio: points.map(([, ratio]) => significant(ratio)),
  };
}

/** Six significant digits: as fine as any chart, and the same on every machine. */
export function significant(value: number): number {
  return Number(value.toPrecision(6));
}

/** y^3.5 as y·y·y·√y, for cp/R = 7/2. */
function powerSevenHalves(y: number): number {
  return y * y * y * Math.sqrt(y);
}
