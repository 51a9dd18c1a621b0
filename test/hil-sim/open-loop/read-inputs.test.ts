import { describe, expect, test } from "vitest";
import { INPUT_COLUMNS, readInputs } from "../../../hil-sim/open-loop/read-inputs.ts";

const HEADER = INPUT_COLUMNS.map(({ name }) => name).join(",");
const row = (time: number | string) => `${time},1,0.25,0,1,101.325,298,4000`;

describe("an inputs file", () => {
  test("becomes rows in SI, engine speed in rpm", () => {
    const { rows, problems } = readInputs(`${HEADER}\n${row(0)}\n${row(1.5)}\n`);
    expect(problems).toEqual([]);
    expect(rows?.[1]).toEqual({
      time: 1.5,
      throttleCommand: 1,
      wastegateCommand: 0.25,
      bypassCommand: 0,
      fuel: 1,
      ambientPressure: 101325,
      ambientTemperature: 298,
      engineSpeedRpm: 4000,
    });
  });

  test("may have its columns in any order, others beside them, a byte-order mark, CRLF and quoted fields", () => {
    const names = [...INPUT_COLUMNS.map(({ name }) => name), "note"].reverse();
    const values = [0, 1, 0.25, 0, 1, 101.325, 298, 4000].map(String);
    const text = `\uFEFF${names.join(",")}\r\n${['"hill, wet"', ...values.reverse()].join(",")}\r\n`;
    expect(readInputs(text).rows?.[0].ambientPressure).toBe(101325);
  });

  test("names every problem of the file with its place in one go", () => {
    const text = [
      HEADER,
      row(0),
      row(0),
      `2,x,0.25,0,1,101.325,298,4000`,
      `3,1,0.25,0,1,1013.25,298,4000`,
    ].join("\n");
    expect(readInputs(text).problems).toEqual([
      {
        line: 4,
        column: 3,
        message: "`throttle_command_ratio` needs a number from 0 to 1, got `x`",
        label: "expected 0 to 1",
      },
      {
        line: 5,
        column: 14,
        message: "`ambient_pressure_kpa` needs a number from 20 to 150, got 1013.25",
        label: "expected 20 to 150",
      },
      {
        line: 3,
        column: 1,
        message: "time 0 s does not come after 0 s",
        label: "expected rising times",
      },
    ]);
  });

  test.each([
    ["", "the file is empty"],
    [HEADER, "no row follows the header"],
    [HEADER.replace("fuel_on,", ""), "the column `fuel_on` is missing"],
    [`${HEADER},time_s\n${row(0)},1`, "the column `time_s` comes twice"],
    [`${HEADER}\n${row(0)},7`, "9 fields in a row, the header has 8"],
    [`${HEADER}\n${row(1)}`, "the first row is at 1 s"],
    [`${HEADER}\n${row("0x10")}`, "`time_s` needs a number from 0 to 3600, got `0x10`"],
    [`${HEADER}\n${row("NaN")}`, "`time_s` needs a number from 0 to 3600, got `NaN`"],
    [`${HEADER}\n"0,1`, "quotation marks do not pair"],
  ])("%j is refused: %s", (text, message) => {
    const { rows, problems } = readInputs(text);
    expect(rows).toBeUndefined();
    expect(problems.map((problem) => problem.message)).toContain(message);
  });
});
