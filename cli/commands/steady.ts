import { extname } from "node:path";
import { type Equilibrium, equilibriumAt, plantParameters, standardPressure } from "../../hil-sim/index.ts";
import type { PlantSpec } from "../../spec/index.ts";
import { EXIT, type ExitCode } from "../exit-codes.ts";
import { requireOutputs } from "../files/require-outputs.ts";
import { writeFileWhole } from "../files/write-file.ts";
import { jsonText, mention, refuse } from "../findings.ts";
import { loadPlant } from "../load-loop.ts";
import { requirePlotKind } from "../plot-file.ts";
import type { Session } from "../session.ts";
import { csvNumber, csvText } from "../trace-csv.ts";

const RADIAN_PER_RPM = Math.PI / 30;
const OPENINGS = [0, 0.1, 0.2, 0.3, 0.4, 0.5, 0.6, 0.8, 1];
/** 25 degC at sea level. */
const AMBIENT = { ambientPressure: standardPressure(0), ambientTemperature: 298.15 };

interface SteadyPoint {
  readonly engine_speed_rpm: number;
  readonly wastegate_opening_ratio: number;
  readonly boost_pressure_kpa: number;
  readonly turbo_speed_rpm: number;
  readonly exhaust_pressure_kpa: number;
  readonly compressor_flow_kg_s: number;
  readonly engine_torque_nm: number;
  /** False: no steady state was found there, as in surge. */
  readonly converged: boolean;
}

/** Every 1000 rpm inside the range that the plant file calls valid. */
function engineSpeeds(plant: PlantSpec): number[] {
  const [low, high] = plant.validity.engineSpeed.map((speed) => speed / RADIAN_PER_RPM);
  const first = Math.ceil(low / 1000 - 1e-9);
  const last = Math.floor(high / 1000 + 1e-9);
  return Array.from({ length: last - first + 1 }, (_, k) => (first + k) * 1000);
}

interface Settled {
  readonly engineSpeedRpm: number;
  readonly opening: number;
  readonly equilibrium: Equilibrium;
}

function settledStates(plant: PlantSpec): Settled[] {
  const parameters = plantParameters(plant);
  return engineSpeeds(plant).flatMap((engineSpeedRpm) =>
    OPENINGS.map((opening) => {
      const engineSpeed = engineSpeedRpm * RADIAN_PER_RPM;
      const point = { throttle: 1, bypass: 0, fuel: 1, engineSpeed, ...AMBIENT };
      return { engineSpeedRpm, opening, equilibrium: equilibriumAt(parameters, point, opening) };
    }),
  );
}

function steadyPoint({ engineSpeedRpm, opening, equilibrium }: Settled): SteadyPoint {
  const { state, engineTorque, converged } = equilibrium;
  return {
    engine_speed_rpm: engineSpeedRpm,
    wastegate_opening_ratio: opening,
    boost_pressure_kpa: state.boostPressure / 1000,
    turbo_speed_rpm: state.turboSpeed / RADIAN_PER_RPM,
    exhaust_pressure_kpa: state.exhaustPressure / 1000,
    compressor_flow_kg_s: state.compressorFlow,
    engine_torque_nm: engineTorque,
    converged,
  };
}

/** Where no steady state was found there is nothing to draw. */
async function writeSteadyPlot(path: string, plant: PlantSpec, settled: readonly Settled[]): Promise<void> {
  const { renderSteadyHtml, renderSteadySvg, steadyPlotOf } = await import(
    "../../verification/report/index.ts"
  );
  const { compressorMap } = await import("../../verification/index.ts");
  const parameters = plantParameters(plant);
  const ambient = { pressure: AMBIENT.ambientPressure, temperature: AMBIENT.ambientTemperature };
  const drawn = settled
    .filter(({ equilibrium }) => equilibrium.converged)
    .map(({ engineSpeedRpm, equilibrium }) => ({ engineSpeedRpm, state: equilibrium.state }));
  const title = `Steady map of ${plant.name}: wide open throttle, 25 degC, sea level`;
  const plot = steadyPlotOf(title, parameters, ambient, compressorMap(parameters), drawn);
  writeFileWhole(path, extname(path) === ".svg" ? renderSteadySvg(plot) : renderSteadyHtml(plot));
}

const HEADER = "  rpm   gate  boost kPa  turbo rpm  exhaust kPa  flow kg/s  torque N*m";

const row = (point: SteadyPoint): string =>
  [
    point.engine_speed_rpm.toFixed(0).padStart(5),
    `${(point.wastegate_opening_ratio * 100).toFixed(0)} %`.padStart(6),
    point.boost_pressure_kpa.toFixed(1).padStart(10),
    point.turbo_speed_rpm.toFixed(0).padStart(10),
    point.exhaust_pressure_kpa.toFixed(1).padStart(12),
    point.compressor_flow_kg_s.toFixed(4).padStart(10),
    point.engine_torque_nm.toFixed(0).padStart(11),
    point.converged ? "" : " no steady state (surge)",
  ]
    .join(" ")
    .trimEnd();

function mapCsv(map: readonly SteadyPoint[]): string {
  const columns = Object.keys(map[0]) as (keyof SteadyPoint)[];
  const cell = (value: number | boolean): string =>
    typeof value === "number" ? csvNumber(value) : String(value);
  return csvText(
    columns,
    map.map((point) => columns.map((column) => cell(point[column]))),
  );
}

export interface SteadyOptions {
  readonly csv?: string;
  readonly plot?: string;
}

/** `steady PLANT`: wide open throttle, 25 degC, sea level. */
export async function steady(plantPath: string, options: SteadyOptions, session: Session): Promise<ExitCode> {
  requirePlotKind(options.plot);
  const loaded = loadPlant(plantPath);
  if (loaded.value === undefined) return refuse(loaded, session, "nothing was computed");
  mention(loaded, session);
  requireOutputs({ "--csv": options.csv, "--plot": options.plot }, [plantPath]);
  const settled = settledStates(loaded.value);
  const map = settled.map(steadyPoint);
  if (options.csv !== undefined) {
    writeFileWhole(options.csv, mapCsv(map));
    session.note(`wrote ${options.csv}`);
  }
  if (options.plot !== undefined) {
    await writeSteadyPlot(options.plot, loaded.value, settled);
    session.note(`wrote ${options.plot}`);
  }
  if (session.json) session.result(jsonText({ ok: true, points: map }));
  else if (options.csv === undefined && options.plot === undefined)
    session.result([HEADER, ...map.map(row)].join("\n"));
  return EXIT.fine;
}
