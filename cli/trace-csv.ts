import { MODES, type Trace } from "../hil-sim/index.ts";
import type { TraceSignal } from "../spec/index.ts";

/** Column of each signal, in the file's order; other programs read these names. */
const COLUMNS = {
  engine_speed: "engine_speed_rpm",
  accelerator: "accelerator_ratio",
  boost_pressure: "boost_pressure_kpa",
  boost_measured: "boost_measured_kpa",
  boost_wanted: "boost_wanted_kpa",
  boost_target: "boost_target_kpa",
  manifold_pressure: "manifold_pressure_kpa",
  exhaust_pressure: "exhaust_pressure_kpa",
  turbo_speed: "turbo_speed_rpm",
  wastegate_opening: "wastegate_opening_ratio",
  wastegate_command: "wastegate_command_ratio",
  compressor_flow: "compressor_flow_kg_s",
  engine_torque: "engine_torque_nm",
  torque_limit: "torque_limit_ratio",
  ambient_pressure: "ambient_pressure_kpa",
  turbo_speed_measured: "turbo_speed_measured_rpm",
  tripped: "tripped",
  guard_active: "guard_active",
  fail_safe: "fail_safe",
} as const satisfies Record<TraceSignal, string>;

export const CSV_SIGNALS = Object.keys(COLUMNS) as TraceSignal[];

/** Nine significant digits tell any two float32 values apart. */
export const csvNumber = (value: number): string => String(Number(value.toPrecision(9)));

/** Rows as RFC 4180 text (CRLF, header first); names and numbers here never need quoting. */
export const csvText = (header: readonly string[], rows: readonly (readonly string[])[]): string =>
  [header, ...rows].map((row) => `${row.join(",")}\r\n`).join("");

/** A trace as CSV, one row per sample; `mode` by name. */
export function traceCsv(trace: Trace): string {
  const signals = CSV_SIGNALS.filter((signal) => trace.signals[signal] !== undefined);
  const header = ["time_s", ...signals.map((signal) => COLUMNS[signal]), ...(trace.mode ? ["mode"] : [])];
  const rows: string[][] = [];
  for (let k = 0; k < trace.length; k++) {
    const values = signals.map((signal) => csvNumber(trace.signals[signal]?.[k] ?? Number.NaN));
    rows.push([csvNumber(k * trace.step), ...values, ...(trace.mode ? [MODES[trace.mode[k]]] : [])]);
  }
  return csvText(header, rows);
}
