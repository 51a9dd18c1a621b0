import type { OutputRow } from "./input-row.ts";

const RPM_PER_RADIAN = 9.549296585513721;

type Read = (row: OutputRow) => number;

/** Columns of an open-loop result, in the file's order; other programs read these names. */
const COLUMNS: Readonly<Record<string, Read>> = {
  boost_pressure_kpa: ({ state }) => state.boostPressure / 1000,
  manifold_pressure_kpa: ({ state }) => state.intakePressure / 1000,
  exhaust_pressure_kpa: ({ state }) => state.exhaustPressure / 1000,
  turbine_outlet_pressure_kpa: ({ state }) => state.outletPressure / 1000,
  turbo_speed_rpm: ({ state }) => state.turboSpeed * RPM_PER_RADIAN,
  compressor_flow_kg_s: ({ state }) => state.compressorFlow,
  boost_temperature_k: ({ state }) => state.boostTemperature,
  compressor_inlet_temperature_k: ({ state }) => state.inletTemperature,
  exhaust_temperature_k: ({ state }) => state.exhaustTemperature,
  exhaust_wall_temperature_k: ({ state }) => state.wallTemperature,
  wastegate_opening_ratio: ({ state }) => state.wastegateOpening,
  bypass_opening_ratio: ({ state }) => state.bypassOpening,
  throttle_opening_ratio: ({ state }) => state.throttleOpening,
  engine_speed_rpm: ({ state }) => state.engineSpeed * RPM_PER_RADIAN,
  throttle_command_ratio: ({ input }) => input.throttleCommand,
  wastegate_command_ratio: ({ input }) => input.wastegateCommand,
  bypass_command_ratio: ({ input }) => input.bypassCommand,
  fuel_on: ({ input }) => input.fuel,
  ambient_pressure_kpa: ({ input }) => input.ambientPressure / 1000,
  ambient_temperature_k: ({ input }) => input.ambientTemperature,
};

/** An open-loop result as CSV (RFC 4180), nine significant digits. */
export function openLoopCsv(rows: readonly OutputRow[]): string {
  const readers = Object.values(COLUMNS);
  const lines = rows.map((row) =>
    [row.time.toFixed(3), ...readers.map((read) => String(Number(read(row).toPrecision(9))))].join(","),
  );
  return [["time_s", ...Object.keys(COLUMNS)].join(","), ...lines, ""].join("\r\n");
}
