import { CsvError, parse } from "csv-parse/sync";
import type { Diagnostic, Source } from "../spec/index.ts";

/** Columns of an open-loop schedule; other columns are ignored. */
export const INPUT_COLUMNS = [
  "time_s",
  "throttle_command_ratio",
  "wastegate_command_ratio",
  "bypass_command_ratio",
  "fuel_on",
  "ambient_pressure_kpa",
  "ambient_temperature_k",
  "engine_speed_rpm",
] as const;
export type InputColumn = (typeof INPUT_COLUMNS)[number];
export type InputValues = Readonly<Record<InputColumn, number>>;

/** What is physically possible, so that a wrong unit is found here and not as a strange curve. */
const LIMITS: Readonly<Record<InputColumn, readonly [number, number]>> = {
  time_s: [0, 86400],
  throttle_command_ratio: [0, 1],
  wastegate_command_ratio: [0, 1],
  bypass_command_ratio: [0, 1],
  fuel_on: [0, 1],
  ambient_pressure_kpa: [20, 120],
  ambient_temperature_k: [200, 350],
  engine_speed_rpm: [100, 20000],
};

export interface InputsResult {
  readonly rows: readonly InputValues[];
  readonly diagnostics: readonly Diagnostic[];
}

interface CsvRecord {
  readonly record: readonly string[];
  readonly info: { readonly lines: number };
}

const finding = (file: string, code: string, line: number, column: number, message: string): Diagnostic => ({
  code,
  severity: "error",
  at: { file, line, column, endLine: line, endColumn: column + 1 },
  message,
});

/** Column of a field in its line, for fields without quotes. */
const columnOf = (record: readonly string[], index: number): number =>
  record.slice(0, index).reduce((sum, field) => sum + field.length + 1, 1);

function parseRecords(source: Source): CsvRecord[] | Diagnostic {
  try {
    return parse(source.text, {
      bom: true,
      info: true,
      skip_empty_lines: true,
      trim: true,
    }) as unknown as CsvRecord[];
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    const line = typeof error.lines === "number" ? error.lines : 1;
    return finding(source.file, "csv-format", line, 1, error.message.toLowerCase());
  }
}

/** Reads the rows of an open-loop schedule; every problem of the file is reported in one run. */
export function readInputsCsv(source: Source): InputsResult {
  const records = parseRecords(source);
  if (!Array.isArray(records)) return { rows: [], diagnostics: [records] };
  const [header, ...body] = records;
  if (header === undefined || body.length === 0) {
    return {
      rows: [],
      diagnostics: [finding(source.file, "csv-format", 1, 1, "a header and at least one row are needed")],
    };
  }
  const missing = INPUT_COLUMNS.filter((column) => !header.record.includes(column)).map((column) =>
    finding(source.file, "csv-missing-column", header.info.lines, 1, `the column \`${column}\` is missing`),
  );
  if (missing.length > 0) return { rows: [], diagnostics: missing };
  return readBody(source.file, header.record, body);
}

function readBody(file: string, header: readonly string[], body: readonly CsvRecord[]): InputsResult {
  const diagnostics: Diagnostic[] = [];
  let before = Number.NEGATIVE_INFINITY;
  const rows = body.map(({ record, info }) => {
    const row = readRow(file, header, record, info.lines, diagnostics);
    if (row.time_s <= before) {
      diagnostics.push(
        finding(
          file,
          "csv-time-order",
          info.lines,
          1,
          `time ${row.time_s} s does not come after ${before} s`,
        ),
      );
    }
    before = row.time_s;
    return row;
  });
  return { rows, diagnostics };
}

function readRow(
  file: string,
  header: readonly string[],
  record: readonly string[],
  line: number,
  diagnostics: Diagnostic[],
): InputValues {
  const cell = (column: InputColumn): number => {
    const index = header.indexOf(column);
    const text = record[index];
    const value = text === "" ? Number.NaN : Number(text);
    const [low, high] = LIMITS[column];
    if (value >= low && value <= high) return value;
    const message = `\`${column}\` is ${JSON.stringify(text)}; expected a number from ${low} to ${high}`;
    diagnostics.push(finding(file, "csv-value", line, columnOf(record, index), message));
    return Number.NaN;
  };
  return Object.fromEntries(INPUT_COLUMNS.map((column) => [column, cell(column)])) as InputValues;
}
