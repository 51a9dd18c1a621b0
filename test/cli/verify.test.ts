import {
  copyFileSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  writeFileSync,
} from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { type CliRun, ROOT, runCli } from "../support/run-cli.ts";
import { scratchFolder } from "../support/scratch.ts";
import { SKARN24, SKARN24_PLANT, SMALLEST } from "../support/smallest.ts";

const FEW = ["--only", "tip_in,tip_in_overshoot", "--runs", "6"];
const folder = mkdtempSync(join(tmpdir(), "spoolwright-test-"));
afterAll(() => rmSync(folder, { recursive: true, force: true }));
const inFolder = (name: string): string => join(folder, name);
const read = (name: string): string => readFileSync(inFolder(name), "utf8");

describe("requirements that hold", () => {
  let run: CliRun;
  beforeAll(() => {
    run = runCli([
      "verify",
      SKARN24,
      ...FEW,
      "--evidence",
      inFolder("e.json"),
      "--report",
      inFolder("r.html"),
    ]);
  });

  test("exit 0; a line per requirement and scenario, seed and number of simulations, the files", () => {
    expect(run).toMatchObject({ code: 0, err: "" });
    expect(run.out).toMatch(
      /^holds +tip_in_overshoot +tip_in +6 runs, worst margin \d.*, violation below 40 % \(95 %\)$/m,
    );
    expect(run.out).toMatch(/^seed 1: 6 simulations in /m);
    expect(run.out).toContain(`wrote ${inFolder("e.json")}\nwrote ${inFolder("r.html")}\n`);
  });

  test("--json has the documented fields; the evidence is the same bytes for any number of threads", () => {
    const json = runCli([
      "verify",
      SKARN24,
      ...FEW,
      "--jobs",
      "1",
      "--evidence",
      inFolder("one.json"),
      "--json",
    ]);
    expect(json).toMatchObject({ code: 0, err: "" });
    expect(JSON.parse(json.out)).toEqual({
      ok: true,
      seed: 1,
      simulations: 6,
      seconds: expect.any(Number),
      requirements: [
        {
          id: "tip_in_overshoot",
          scenario: "tip_in",
          verdict: "holds",
          runs: 6,
          exercised: 6,
          violations: 0,
          worst_margin: expect.any(Number),
          violation_probability_upper_95: expect.any(Number),
          corner_runs: 20,
          corner_exercised: 20,
          corner_violations: 0,
          corner_worst_margin: expect.any(Number),
          counterexample: null,
        },
      ],
    });
    expect(read("one.json")).toBe(read("e.json"));
    expect(read("e.json")).not.toContain(folder);
  });

  test("the report is one page, the same from the campaign and from its evidence", () => {
    expect(read("r.html")).toMatch(/^<!doctype html>/i);
    expect(read("r.html")).toContain("tip_in_overshoot");
    const again = runCli(["report", inFolder("e.json"), "--out", inFolder("again.html"), "--spec", SKARN24]);
    expect(again).toMatchObject({ code: 0, err: "" });
    expect(read("again.html")).toBe(read("r.html"));
  });
});

describe("a violated requirement", () => {
  const counterexample = "tip_in_overshoot.tip_in.counterexample.yaml";
  let run: CliRun;

  /** The complete example with a requirement that nothing can meet, verified with its evidence in another folder. */
  beforeAll(() => {
    const [before, after] = readFileSync(join(ROOT, SKARN24), "utf8").split("- id: tip_in_overshoot");
    const impossible = after.replace(/at_most: [^}]*\}/, "at_most: 0.001 % }");
    writeFileSync(inFolder("skarn24.yaml"), `${before}- id: tip_in_overshoot${impossible}`);
    copyFileSync(join(ROOT, SKARN24_PLANT), inFolder("skarn24.plant.yaml"));
    mkdirSync(inFolder("out"));
    run = runCli(["verify", "skarn24.yaml", ...FEW, "--evidence", "out/e.json"], { cwd: folder });
  });

  test("exit 1; where, by how much, and a command that shows it again", () => {
    expect(run.code).toBe(1);
    expect(run.err).toMatch(/requirement `tip_in_overshoot` violated in \d+ of 6 random runs/);
    expect(run.err).toMatch(/skarn24\.yaml:\d+/);
    const again = /again: spoolwright (replay .*)/.exec(run.err)?.[1].split(" ") ?? [];
    expect(again).toEqual(["replay", `out/${counterexample}`, "--spec", "skarn24.yaml"]);
    const replay = runCli([...again, "--json", "--csv", "broken.csv"], { cwd: folder });
    expect(replay.code).toBe(1);
    const { margin, margin_found, ...rest } = JSON.parse(replay.out);
    expect(margin).toBe(margin_found);
    expect(rest).toMatchObject({
      ok: false,
      requirement: "tip_in_overshoot",
      changes: [],
      written: ["broken.csv"],
    });
  });

  test("beside its spec the counterexample needs no --spec; the run can be drawn", () => {
    copyFileSync(inFolder(`out/${counterexample}`), inFolder(counterexample));
    const replay = runCli(["replay", counterexample, "--plot", "broken.svg"], { cwd: folder });
    expect(replay.code).toBe(1);
    expect(replay.err).toMatch(/violated in `tip_in`: margin (-[\d.]+), \1 when it was found/);
    expect(read("broken.svg")).toContain("<svg ");
  });

  test("against a spec that meets it, the replay says that it holds now and what has changed", () => {
    const replay = runCli(["replay", inFolder(`out/${counterexample}`), "--spec", SKARN24]);
    expect(replay).toMatchObject({ code: 0, err: "" });
    expect(replay.out).toContain("holds now");
    expect(replay.out).toContain("requirements have changed");
  });
});

describe("a requirement that no run exercises", () => {
  const cwd = folder;
  const SPEC = "silent.yaml";

  /** The complete example with a requirement that only a trip, and one that only a low accelerator, would exercise. */
  beforeAll(() => {
    const asked = (id: string, condition: string): string =>
      `\n  - id: ${id}\n    says: Turbo speed stays bounded then.\n    scenarios: [tip_in, steps_up]\n` +
      `    stays: { signal: turbo_speed, below: 165000 rpm, scale: 6000 rpm, while: ${condition} }\n`;
    const added =
      asked("after_a_trip", "{ signal: tripped, above: 0.5 }") +
      asked("closed_pedal", "{ signal: accelerator, below: 50 % }");
    writeFileSync(inFolder(SPEC), readFileSync(join(ROOT, SKARN24), "utf8") + added);
    copyFileSync(join(ROOT, SKARN24_PLANT), inFolder("skarn24.plant.yaml"));
  });
  const verify = (...only: string[]): CliRun =>
    runCli(["verify", SPEC, "--runs", "2", "--report", "r.html", "--only", only.join(",")], { cwd });

  test("in any scenario: exit 1, with the reason on its line and in the complaint; the report counts it out", () => {
    const run = verify("after_a_trip", "tip_in_overshoot", "tip_in", "steps_up");
    expect(run.code).toBe(1);
    for (const scenario of ["tip_in", "steps_up"]) {
      const line = new RegExp(
        `^not exercised after_a_trip +${scenario} +0 of 2 runs: its .while. was never true$`,
        "m",
      );
      expect(run.out).toMatch(line);
    }
    expect(run.err).toMatch(
      /^requirement `after_a_trip` not exercised in any scenario, so not tested: its `while`/,
    );
    expect(run.err).toMatch(/silent\.yaml:\d+\n$/);
    expect(read("r.html")).toContain("No violation found: 1 of 2 requirements tested.");
    const json = runCli(["verify", SPEC, "--runs", "2", "--only", "after_a_trip", "--json"], { cwd });
    expect(json).toMatchObject({ code: 1, err: "" });
    const { ok, requirements } = JSON.parse(json.out);
    expect(ok).toBe(false);
    expect(requirements[0]).toMatchObject({ verdict: "not_exercised", exercised: 0, worst_margin: null });
  });

  test("in some scenario only: exit 0, and the line of the silent one says so", () => {
    const run = verify("closed_pedal", "tip_in", "steps_up");
    expect(run).toMatchObject({ code: 0, err: "" });
    expect(run.out).toMatch(
      /^not exercised closed_pedal +steps_up +0 of 2 runs: its `while` was never true$/m,
    );
    expect(run.out).toMatch(/^holds +closed_pedal +tip_in +2 runs, worst margin/m);
    expect(read("r.html")).toContain("No violation found: 1 requirement tested.");
  });
});

describe("wrong use", () => {
  test.each([
    [["--only", "nothing"], "no requirement or scenario `nothing`"],
    [["--only", "tip_in,step_overshoot"], "`step_overshoot` is asked of none of the scenarios to run"],
    [["--runs", "0"], "whole number from 1"],
    [["--jobs", "none"], "whole number from 1"],
    [["--agreement", "none.json", "--report", "x.html"], "cannot read none.json"],
  ])("%j", (args, words) => {
    const cwd = scratchFolder();
    const run = runCli(["verify", join(ROOT, SKARN24), "--runs", "1", "--only", "tip_in", ...args], { cwd });
    expect(run.code).toBeGreaterThan(0);
    expect(run.err).toContain(words);
    expect(readdirSync(cwd)).toEqual([]);
  });

  test("a spec without a plant", () => {
    expect(runCli(["verify", SMALLEST])).toMatchObject({ code: 2, out: "" });
  });
});

describe("bad files", () => {
  test.each([
    ["a missing one", undefined],
    ["not YAML", "a: [1, {"],
    ["another file", "spoolwright: 1\ncontroller: {}\n"],
    ["bytes", Uint8Array.of(0xff, 0)],
  ])("replay of %s: a finding, exit 1", (_what, content) => {
    const file = join(scratchFolder(), "x.counterexample.yaml");
    if (content !== undefined) writeFileSync(file, content);
    const run = runCli(["replay", file, "--json"]);
    expect(run).toMatchObject({ code: 1, err: "" });
    expect(JSON.parse(run.out).diagnostics[0]).toMatchObject({ file, line: expect.any(Number) });
  });

  const HOLLOW = '{"format":1,"requirements":[{}],"traces":[{}]}';
  test.each(["", "null", '{"format":2}', HOLLOW])(
    "report of %j: a sentence, exit 1, nothing written",
    (text) => {
      const cwd = scratchFolder();
      writeFileSync(join(cwd, "e.json"), text);
      const run = runCli(["report", "e.json", "--out", "r.html"], { cwd });
      expect(run).toMatchObject({ code: 1, out: "" });
      expect(run.err).not.toMatch(/ {4}at /);
      expect(existsSync(join(cwd, "r.html"))).toBe(false);
    },
  );
});
