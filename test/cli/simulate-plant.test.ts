import { readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { runCli } from "../support/run-cli.ts";
import { scratchFolder } from "../support/scratch.ts";
import { SKARN24_PLANT } from "../support/smallest.ts";

const HEADER =
  "time_s,throttle_command_ratio,wastegate_command_ratio,bypass_command_ratio,fuel_on,ambient_pressure_kpa,ambient_temperature_k,engine_speed_rpm";
const INPUTS = [
  HEADER,
  "0,0.25,1,0,1,101.325,298,4000",
  "0.5,1,0,0,1,101.325,298,4000",
  "1,1,0,0,1,101.325,298,4000",
];

function inputsFile(lines: readonly string[]): { folder: string; inputs: string; csv: string } {
  const folder = scratchFolder();
  const inputs = join(folder, "in.csv");
  writeFileSync(inputs, lines.join("\n"));
  return { folder, inputs, csv: join(folder, "out.csv") };
}

test("writes one row per 10 ms from the first to the last row of the inputs", () => {
  const { inputs, csv } = inputsFile(INPUTS);
  const run = runCli(["simulate", SKARN24_PLANT, "--inputs", inputs, "--csv", csv]);
  expect(run).toMatchObject({ code: 0, err: "" });
  const [header, ...rows] = readFileSync(csv, "utf8").trimEnd().split("\r\n");
  expect(header.split(",").slice(0, 2)).toEqual(["time_s", "boost_pressure_kpa"]);
  expect(rows).toHaveLength(101);
  expect(rows.at(-1)?.split(",")[0]).toBe("1.000");
  const boost = rows.map((row) => Number(row.split(",")[1]));
  expect(boost[100]).toBeGreaterThan(boost[0]);
});

test("without --csv the rows are the result, byte for byte the same", () => {
  const { inputs, csv } = inputsFile(INPUTS);
  runCli(["simulate", SKARN24_PLANT, "--inputs", inputs, "--csv", csv]);
  expect(runCli(["simulate", SKARN24_PLANT, "--inputs", inputs]).out).toBe(readFileSync(csv, "utf8"));
});

test("--json names the file and the number of rows", () => {
  const { inputs, csv } = inputsFile(INPUTS);
  const run = runCli(["simulate", SKARN24_PLANT, "--inputs", inputs, "--csv", csv, "--json"]);
  expect(JSON.parse(run.out)).toMatchObject({ ok: true, rows: 101, csv });
});

test("a bad inputs file is a finding with its place, and nothing is written", () => {
  const { folder, inputs, csv } = inputsFile([HEADER, "0,x,1,0,1,101.325,298,4000"]);
  const run = runCli(["simulate", SKARN24_PLANT, "--inputs", inputs, "--csv", csv]);
  expect(run).toMatchObject({ code: 1, out: "" });
  expect(run.err).toMatch(/in\.csv:2:3: error: [\s\S]*\(bad-inputs\)/);
  expect(readdirSync(folder)).toEqual(["in.csv"]);
});

test("a missing inputs file is a finding, no inputs at all is wrong use", () => {
  expect(runCli(["simulate", SKARN24_PLANT, "--inputs", "none.csv"])).toMatchObject({ code: 1, out: "" });
  expect(runCli(["simulate", SKARN24_PLANT])).toMatchObject({ code: 2, out: "" });
});
