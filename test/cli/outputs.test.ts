import { cpSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { ROOT, runCli } from "../support/run-cli.ts";
import { scratchFolder } from "../support/scratch.ts";

const SPEC = "skarn24.yaml";
const PLANT = "skarn24.plant.yaml";
const EVIDENCE = '{ "format": 1, "requirements": [], "traces": [] }';
const INPUTS = [
  "time_s,throttle_command_ratio,wastegate_command_ratio,bypass_command_ratio,fuel_on,ambient_pressure_kpa,ambient_temperature_k,engine_speed_rpm",
  "0,0.25,1,0,1,101.325,298,4000",
  "1,1,0,0,1,101.325,298,4000",
].join("\n");
const COUNTEREXAMPLE = "tip_in_overshoot.tip_in.counterexample.yaml";

/** The complete example in a folder of its own, with an evidence file and an inputs file. */
function demo(): string {
  const folder = scratchFolder();
  for (const name of [SPEC, PLANT]) cpSync(join(ROOT, "examples/skarn24", name), join(folder, name));
  writeFileSync(join(folder, "e.json"), EVIDENCE);
  writeFileSync(join(folder, "in.csv"), INPUTS);
  return folder;
}

const contents = (folder: string) =>
  readdirSync(folder).map((name) => [name, readFileSync(join(folder, name), "utf8")]);

/** More runs than this test's patience: an output must be refused before the campaign, not after it. */
const MANY = ["--only", "tip_in", "--runs", "1e7"];

test.each([
  [["simulate", SPEC, "--scenario", "tip_in", "--csv", SPEC], `would overwrite ${SPEC}`],
  [["simulate", SPEC, "--scenario", "tip_in", "--csv", PLANT], `would overwrite ${PLANT}`],
  [["simulate", SPEC, "--scenario", "tip_in", "--csv", "a.svg", "--plot", "./a.svg"], "the same file"],
  [["verify", SPEC, ...MANY, "--evidence", PLANT], `would overwrite ${PLANT}`],
  [["verify", SPEC, ...MANY, "--report", SPEC], `would overwrite ${SPEC}`],
  [["verify", SPEC, ...MANY, "--evidence", "x", "--report", "x"], "the same file"],
  [["verify", SPEC, ...MANY, "--report", COUNTEREXAMPLE], "the same file"],
  [["verify", SPEC, ...MANY, "--evidence", "n", "--agreement", "e.json", "--report", "e.json"], "overwrite"],
  [["verify", SPEC, ...MANY, "--evidence", `${SPEC}/x.json`], `${SPEC} is a file, not a folder`],
  [["verify", SPEC, ...MANY, "--report", "."], "it is a folder"],
  [["simulate", PLANT, "--inputs", "in.csv", "--csv", "in.csv"], "would overwrite in.csv"],
  [["simulate", PLANT, "--inputs", "in.csv", "--csv", PLANT], `would overwrite ${PLANT}`],
  [["steady", PLANT, "--csv", PLANT], `would overwrite ${PLANT}`],
  [["report", "e.json", "--out", "e.json"], "would overwrite e.json"],
  [["report", "e.json", "--spec", SPEC, "--out", PLANT], `would overwrite ${PLANT}`],
  [["agree", SPEC, "--out", SPEC], `would overwrite ${SPEC}`],
  [["generate", SPEC, "--out", "."], `holds ${SPEC}`],
])("%j is wrong use and leaves every file as it is", (args, words) => {
  const cwd = demo();
  const before = contents(cwd);
  const run = runCli(args, { cwd });
  expect(run).toMatchObject({ code: 2, out: "" });
  expect(run.err).toContain(words);
  expect(contents(cwd)).toEqual(before);
});

test.skipIf(process.platform !== "linux")(
  "a file system that makes no folders does not hang the command",
  () => {
    const run = runCli(["verify", SPEC, ...MANY, "--evidence", "/proc/x/y.json"], { cwd: demo() });
    expect(run).toMatchObject({ code: 2, out: "" });
    expect(run.err).toContain("cannot write --evidence /proc/x/y.json: ");
  },
);

test("a replay does not overwrite its counterexample, its spec or its plant", () => {
  const cwd = demo();
  const spec = readFileSync(join(cwd, SPEC), "utf8");
  const [before, after] = spec.split("- id: tip_in_overshoot");
  const impossible = after.replace(/at_most: [^}]*\}/, "at_most: 0.001 % }");
  writeFileSync(join(cwd, SPEC), `${before}- id: tip_in_overshoot${impossible}`);
  runCli(["verify", SPEC, "--only", "tip_in,tip_in_overshoot", "--runs", "1"], { cwd });
  const all = contents(cwd);
  expect(all.map(([name]) => name)).toContain(COUNTEREXAMPLE);
  for (const path of [COUNTEREXAMPLE, SPEC, PLANT]) {
    const run = runCli(["replay", COUNTEREXAMPLE, "--csv", path], { cwd });
    expect(run).toMatchObject({ code: 2, out: "" });
    expect(run.err).toContain(`would overwrite ${path}`);
  }
  expect(contents(cwd)).toEqual(all);
});
