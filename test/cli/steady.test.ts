import { readFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { runCli } from "../support/run-cli.ts";
import { scratchFolder } from "../support/scratch.ts";
import { SKARN24_PLANT, SMALLEST } from "../support/smallest.ts";

test("the steady map has a header and a row per speed and opening", () => {
  const run = runCli(["steady", SKARN24_PLANT]);
  const lines = run.out.trimEnd().split("\n");
  expect(run).toMatchObject({ code: 0, err: "" });
  expect(lines[0]).toContain("boost kPa");
  expect((lines.length - 1) % 9).toBe(0);
});

test("text, CSV and JSON tell the same; away from the closed stop a more open gate gives less boost", () => {
  const file = join(scratchFolder(), "map.csv");
  const { points } = JSON.parse(runCli(["steady", SKARN24_PLANT, "--csv", file, "--json"]).out);
  const [header, ...rows] = readFileSync(file, "utf8").trimEnd().split("\r\n");
  expect(header).toBe(Object.keys(points[0]).join(","));
  expect(rows).toHaveLength(points.length);
  expect(Number(rows[3].split(",")[2])).toBeCloseTo(points[3].boost_pressure_kpa, 4);
  for (let k = 1; k < points.length; k++) {
    const [open, less] = [points[k], points[k - 1]];
    if (open.engine_speed_rpm !== less.engine_speed_rpm || less.wastegate_opening_ratio < 0.2) continue;
    expect(open.boost_pressure_kpa).toBeLessThan(less.boost_pressure_kpa);
  }
});

test("--plot draws the map as SVG or HTML, and refuses other kinds before any work", () => {
  const folder = scratchFolder();
  for (const [name, starts] of [
    ["map.svg", "<?xml"],
    ["map.html", "<!doctype html>"],
  ]) {
    const run = runCli(["steady", SKARN24_PLANT, "--plot", join(folder, name)]);
    expect(run).toMatchObject({ code: 0, out: `wrote ${join(folder, name)}\n` });
    const text = readFileSync(join(folder, name), "utf8");
    expect(text.startsWith(starts)).toBe(true);
    for (const label of ["surge line", "choke", "3000", "7000"]) expect(text).toContain(`>${label}</text>`);
  }
  const refused = runCli(["steady", SKARN24_PLANT, "--plot", join(folder, "map.png")]);
  expect(refused).toMatchObject({ code: 2, out: "" });
});

test("a loop spec in place of a plant file is a finding", () => {
  const run = runCli(["steady", SMALLEST]);
  expect(run).toMatchObject({ code: 1, out: "" });
  expect(run.err).toContain("smallest.yaml:");
});
