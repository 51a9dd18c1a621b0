import { expect, test } from "vitest";
import { INPUT_COLUMNS, readInputsCsv } from "../../cli/read-inputs-csv.ts";

const HEADER = INPUT_COLUMNS.join(",");
const ROW = "0,0.25,1,0,1,101.325,298,4000";
const read = (...lines: string[]) => readInputsCsv({ file: "in.csv", text: lines.join("\r\n") });
const places = (...lines: string[]) =>
  read(...lines).diagnostics.map(({ code, at }) => `${code} ${at.line}:${at.column}`);

test("reads the named columns in any order and ignores others", () => {
  const { rows, diagnostics } = read(
    `remark,${INPUT_COLUMNS.toReversed().join(",")}`,
    `x,${ROW.split(",").toReversed()}`,
  );
  expect(diagnostics).toEqual([]);
  expect(rows).toEqual([
    {
      time_s: 0,
      throttle_command_ratio: 0.25,
      wastegate_command_ratio: 1,
      bypass_command_ratio: 0,
      fuel_on: 1,
      ambient_pressure_kpa: 101.325,
      ambient_temperature_k: 298,
      engine_speed_rpm: 4000,
    },
  ]);
});

test("a byte order mark and blank lines do no harm", () => {
  expect(read(`\uFEFF${HEADER}`, "", ROW, "").rows).toHaveLength(1);
});

test("names every missing column", () => {
  expect(places("time_s,fuel_on", "0,1")).toEqual(Array(6).fill("csv-missing-column 1:1"));
});

test("reports every bad field at its line and column: text, empty, infinite, wrong unit", () => {
  const bad = ["0,x,1,0,1,101.325,298,4000", "1,,1,0,1,101325,298,4000", "2,0,1,0,1,101.325,298,Infinity"];
  expect(places(HEADER, ...bad)).toEqual([
    "csv-value 2:3",
    "csv-value 3:3",
    "csv-value 3:10",
    "csv-value 4:23",
  ]);
});

test("time must go forward", () => {
  expect(places(HEADER, ROW, ROW)).toEqual(["csv-time-order 3:1"]);
});

test("a line of another length, an open quote, no rows and no text are findings too", () => {
  expect(places(HEADER, "0,1")).toEqual(["csv-format 2:1"]);
  expect(places(HEADER, '"0,1')).toEqual([expect.stringContaining("csv-format")]);
  expect(places(HEADER)).toEqual(["csv-format 1:1"]);
  expect(places("")).toEqual(["csv-format 1:1"]);
});
