import { CsvError, parse } from "csv-parse/sync";
import type { InputRow } from "./input-row.ts";

interface Column {
  readonly name: string;
  readonly low: number;
  readonly high: number;
}

/** Columns of an inputs file, in any order, with the range each accepts. */
export const INPUT_COLUMNS: readonly Column[] = [
  { name: "time_s", low: 0, high: 3600 },
  { name: "throttle_command_ratio", low: 0, high: 1 },
  { name: "wastegate_command_ratio", low: 0, high: 1 },
  { name: "bypass_command_ratio", low: 0, high: 1 },
  { name: "fuel_on", low: 0, high: 1 },
  { name: "ambient_pressure_kpa", low: 20, high: 150 },
  { name: "ambient_temperature_k", low: 200, high: 350 },
  { name: "engine_speed_rpm", low: 0, high: 19000 },
];

/** What is wrong with an inputs file, where: line and column from 1. */
export interface InputProblem {
  readonly line: number;
  readonly column: number;
  readonly message: string;
  readonly label: string;
}

export interface InputsResult {
  /** Only without a problem. */
  readonly rows?: readonly InputRow[];
  readonly problems: readonly InputProblem[];
}

interface Line {
  readonly fields: readonly string[];
  readonly raw: string;
  readonly line: number;
}

/** Reads an inputs file (RFC 4180, header first); every problem of the file in one go, never throws for bad text. */
export function readInputs(text: string): InputsResult {
  const parsed = splitLines(text);
  if ("problem" in parsed) return { problems: [parsed.problem] };
  const [header, ...lines] = parsed.lines;
  if (header === undefined) {
    return { problems: [problemAt(1, 1, "the file is empty", "expected a header line")] };
  }
  const problems = headerProblems(header);
  if (problems.length > 0) return { problems };
  const places = INPUT_COLUMNS.map(({ name }) => header.fields.indexOf(name));
  const rows = lines.map((line) => readRow(line, places, header.fields.length, problems));
  if (rows.length === 0)
    problems.push(problemAt(header.line, 1, "no row follows the header", "expected rows"));
  checkTimes(rows, lines, places[0], problems);
  return problems.length > 0 ? { problems } : { rows, problems };
}

function splitLines(text: string): { readonly lines: Line[] } | { readonly problem: InputProblem } {
  try {
    const records = parse(text, {
      bom: true,
      info: true,
      raw: true,
      relax_column_count: true,
      skip_empty_lines: true,
      trim: true,
    }) as unknown as { record: string[]; raw: string; info: { lines: number } }[];
    return { lines: records.map(({ record, raw, info }) => ({ fields: record, raw, line: info.lines })) };
  } catch (error) {
    if (!(error instanceof CsvError)) throw error;
    const line = typeof error.lines === "number" ? error.lines : 1;
    return { problem: problemAt(line, 1, "quotation marks do not pair", "expected RFC 4180 text") };
  }
}

function headerProblems(header: Line): InputProblem[] {
  const wanted = INPUT_COLUMNS.map(({ name }) => name);
  const missing = wanted.filter((name) => !header.fields.includes(name));
  const repeated = wanted.filter((name) => header.fields.indexOf(name) !== header.fields.lastIndexOf(name));
  return [
    ...missing.map((name) =>
      problemAt(header.line, 1, `the column \`${name}\` is missing`, `expected ${wanted.join(", ")}`),
    ),
    ...repeated.map((name) =>
      problemAt(
        header.line,
        columnOf(header, header.fields.lastIndexOf(name)),
        `the column \`${name}\` comes twice`,
        "expected each column once",
      ),
    ),
  ];
}

function readRow(line: Line, places: readonly number[], width: number, problems: InputProblem[]): InputRow {
  if (line.fields.length !== width) {
    const message = `${line.fields.length} fields in a row, the header has ${width}`;
    problems.push(problemAt(line.line, 1, message, `expected ${width} fields`));
  }
  const values = INPUT_COLUMNS.map((column, i) => readField(line, places[i], column, problems));
  const [time, throttleCommand, wastegateCommand, bypassCommand, fuel, kilopascal, kelvin, rpm] = values;
  return {
    time,
    throttleCommand,
    wastegateCommand,
    bypassCommand,
    fuel,
    ambientPressure: kilopascal * 1000,
    ambientTemperature: kelvin,
    engineSpeedRpm: rpm,
  };
}

const DECIMAL = /^[+-]?(\d+\.?\d*|\.\d+)([eE][+-]?\d+)?$/;

function readField(line: Line, place: number, column: Column, problems: InputProblem[]): number {
  const text = line.fields[place];
  if (text === undefined) return Number.NaN;
  const value = DECIMAL.test(text) ? Number(text) : Number.NaN;
  if (value >= column.low && value <= column.high) return value;
  const found = Number.isNaN(value) ? `got \`${text.slice(0, 40)}\`` : `got ${text.slice(0, 40)}`;
  const message = `\`${column.name}\` needs a number from ${column.low} to ${column.high}, ${found}`;
  const label = `expected ${column.low} to ${column.high}`;
  problems.push(problemAt(line.line, columnOf(line, place), message, label));
  return Number.NaN;
}

function checkTimes(
  rows: readonly InputRow[],
  lines: readonly Line[],
  place: number,
  problems: InputProblem[],
): void {
  for (const [i, row] of rows.entries()) {
    const at = () => columnOf(lines[i], place);
    if (i === 0 && row.time > 0) {
      problems.push(problemAt(lines[i].line, at(), `the first row is at ${row.time} s`, "expected 0"));
    }
    if (i > 0 && row.time <= rows[i - 1].time) {
      const message = `time ${row.time} s does not come after ${rows[i - 1].time} s`;
      problems.push(problemAt(lines[i].line, at(), message, "expected rising times"));
    }
  }
}

/** Column where a field starts; 1 in lines with quotation marks. */
function columnOf(line: Line, place: number): number {
  if (line.raw.includes('"')) return 1;
  const before = line.raw
    .replace(/^\uFEFF/, "")
    .split(",")
    .slice(0, place);
  return 1 + before.reduce((sum, field) => sum + field.length + 1, 0);
}

function problemAt(line: number, column: number, message: string, label: string): InputProblem {
  return { line, column, message, label };
}
