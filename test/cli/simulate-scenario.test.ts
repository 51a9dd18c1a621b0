import { readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { ROOT, runCli } from "../support/run-cli.ts";
import { scratchFolder } from "../support/scratch.ts";
import { SKARN24, SMALLEST } from "../support/smallest.ts";

const simulate = (...args: string[]) => runCli(["simulate", SKARN24, "--scenario", "tip_in", ...args]);

test("writes the documented columns, one row per millisecond, and says how each requirement came out", () => {
  const csv = join(scratchFolder(), "run.csv");
  const run = simulate("--csv", csv);
  expect(run).toMatchObject({ code: 0, err: "" });
  expect(run.out).toMatch(/tip_in_overshoot +holds, margin \d/);
  const [header, ...rows] = readFileSync(csv, "utf8").trimEnd().split("\r\n");
  const columns = header.split(",");
  expect(columns[0]).toBe("time_s");
  const documented =
    "engine_speed_rpm accelerator_ratio boost_pressure_kpa boost_measured_kpa boost_wanted_kpa boost_target_kpa " +
    "manifold_pressure_kpa exhaust_pressure_kpa turbo_speed_rpm wastegate_opening_ratio wastegate_command_ratio " +
    "compressor_flow_kg_s engine_torque_nm mode torque_limit_ratio";
  expect(columns).toEqual(expect.arrayContaining(documented.split(" ")));
  expect(rows).toHaveLength(6001);
  expect(rows[6000].split(",")[columns.indexOf("mode")]).toBe("closed_loop");
});

test("the same random run gives the same bytes; it can be drawn as SVG and as a page", () => {
  const folder = scratchFolder();
  const file = (name: string): string => join(folder, name);
  simulate("--run", "7", "--seed", "3", "--csv", file("a.csv"), "--plot", file("run.svg"));
  simulate("--run", "7", "--seed", "3", "--csv", file("b.csv"), "--plot", file("run.html"));
  expect(readFileSync(file("b.csv"), "utf8")).toBe(readFileSync(file("a.csv"), "utf8"));
  expect(readFileSync(file("run.svg"), "utf8")).toContain("<svg ");
  expect(readFileSync(file("run.html"), "utf8")).toMatch(/^<!doctype html>/i);
});

test("--set changes the spec for this run", () => {
  const marginOf = (...args: string[]): number => {
    const { margins } = JSON.parse(simulate("--json", ...args).out);
    return margins.find(({ id }: { id: string }) => id === "tip_in_overshoot").margin;
  };
  expect(marginOf("--set", "controller.feedback.integral=20000 mm2/s")).not.toBe(marginOf());
});

test("a violated requirement is a finding: exit 1, named on standard error, `ok` false", () => {
  const windsUp = ["--set", "controller.feedback.anti_windup={ method: none }"];
  const run = simulate(...windsUp, "--quiet");
  expect(run).toMatchObject({ code: 1, out: "" });
  expect(run.err).toMatch(/^violated in `tip_in`: .*tip_in_overshoot/);
  expect(simulate(...windsUp).out).toMatch(/tip_in_overshoot +violated, margin -\d/);
  const json = simulate(...windsUp, "--json");
  expect(json).toMatchObject({ code: 1, err: "" });
  expect(JSON.parse(json.out).ok).toBe(false);
  expect(JSON.parse(simulate("--json").out).ok).toBe(true);
});

test("--set is checked like the spec itself", () => {
  const wrongUnit = simulate("--set", "controller.step=5 kPa");
  expect(wrongUnit).toMatchObject({ code: 1, out: "" });
  expect(wrongUnit.err).toContain("wrong-unit");
  expect(simulate("--set", "controller.nothing.here=1")).toMatchObject({ code: 2, out: "" });
  expect(simulate("--set", "controller.step")).toMatchObject({ code: 2, out: "" });
});

test("a finding about a setting names its path and value and points at the command line", () => {
  const settings = ["controller.feedback.integral=20000 mm2/s", "controller.overspeed_guard.trip=null"];
  const empty = simulate(...settings.flatMap((each) => ["--set", each]));
  expect(empty).toMatchObject({ code: 1, out: "" });
  expect(empty.err).toContain("--set:2:1: error:");
  expect(empty.err).toContain("controller.overspeed_guard.trip=null");
  expect(empty.err).not.toContain("Cannot convert");
  const unknown = simulate("--set", "controller.overspeed_guard.trip=null", "--set", "nonsense=3");
  expect(unknown.err).toMatch(/--set:2:1: error: the file has no key `nonsense`.*\n +nonsense=3\n/);
  expect(unknown.err).not.toContain("skarn24.yaml:");
});

test("a finding about the file keeps the line it has on disk, whatever --set adds above it", () => {
  const folder = scratchFolder();
  const lines = readFileSync(join(ROOT, SKARN24), "utf8").replace("plant: ./", "plannt: ./").split("\n");
  writeFileSync(join(folder, "a.yaml"), lines.join("\n"));
  const line = lines.findIndex((text) => text.startsWith("plannt:")) + 1;
  const run = runCli(["simulate", "a.yaml", "--scenario", "tip_in", "--set", "controller.nonsense=[1, 2]"], {
    cwd: folder,
  });
  expect(run.err).toContain(`a.yaml:${line}:1: error: `);
  expect(run.err).toMatch(/ plannt: \.\//);
  expect(run.err).toContain("--set:1:1: error: ");
});

test("an unknown scenario is wrong use and the known ones are named", () => {
  const run = runCli(["simulate", SKARN24, "--scenario", "tip_out"]);
  expect(run).toMatchObject({ code: 2, out: "" });
  expect(run.err).toContain("tip_in");
});

test("a spec without a plant cannot be simulated", () => {
  expect(runCli(["simulate", SMALLEST, "--scenario", "tip_in"]).err).toContain("has no plant");
});

test("another kind of plot is refused before anything is written", () => {
  const folder = scratchFolder();
  const run = simulate("--csv", join(folder, "run.csv"), "--plot", join(folder, "run.png"));
  expect(run).toMatchObject({ code: 2, out: "" });
  expect(readdirSync(folder)).toEqual([]);
});

test("both or neither of --scenario and --inputs is wrong use", () => {
  expect(runCli(["simulate", SKARN24]).code).toBe(2);
  expect(simulate("--inputs", "in.csv").code).toBe(2);
});
