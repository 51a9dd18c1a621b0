import { describe, expect, it } from "vitest";
import { lowerSpec } from "../../generator/index.ts";
import type { ControllerPort } from "../../hil-sim/index.ts";
import type { LoopSpec } from "../../spec/index.ts";
import {
  batchRunner,
  portFromRuntime,
  requirementsOf,
  runCampaign,
  type SpecValue,
  setInSpec,
} from "../../verification/index.ts";
import { summarise } from "../../verification/summarise.ts";
import { exampleLoop, exampleText, runtimePort } from "./example-loop.ts";

const RUNS = 10;

/** Ids of the requirements that are violated on the named scenarios within a few random runs. */
async function violated(
  loop: LoopSpec,
  port: ControllerPort,
  names: readonly string[],
): Promise<Set<string>> {
  const some = { ...loop, scenarios: loop.scenarios.filter(({ name }) => names.includes(name)) };
  const requirements = some.scenarios.map((scenario) => requirementsOf(some, scenario));
  const run = batchRunner(some, port, 1);
  const plan = { requirements: requirements.map(({ length }) => length), runs: RUNS, corners: 0 };
  const { random } = await runCampaign(plan, async (batch) => run(batch));
  return new Set(
    requirements.flatMap((list, scenario) =>
      list
        .filter((_, column) => summarise(random[scenario].margins[column]).verdict === "violated")
        .map(({ id }) => id),
    ),
  );
}

const edited = (...edits: readonly (readonly [string, SpecValue | undefined])[]) =>
  exampleLoop(edits.reduce((text, [path, value]) => setInSpec(text, path, value), exampleText()));
const violatedBy = (loop: LoopSpec, ...names: string[]) => violated(loop, runtimePort(loop), names);

const GUARD = "controller.overspeed_guard";
const PROPORTIONAL = [
  "lead",
  "acceleration_window",
  "reference_speed",
  "gain",
  "integral_rate",
  "safe_pressure_ratio",
  "target_reduction",
  "target_release",
];
const stuck = { kind: "boost_pressure_stuck", value: "between 100 kPa abs and 115 kPa abs", at: "0.5 s" };

describe("the complete example", () => {
  it("violates nothing in the same few runs", async () => {
    const example = exampleLoop();
    const names = example.scenarios.map(({ name }) => name);
    expect([...(await violatedBy(example, ...names))]).toEqual([]);
  });
});

describe("a controller broken on purpose is caught", () => {
  it("without anti-windup: a tip-in overshoots", async () => {
    const loop = edited(["controller.feedback.anti_windup", { method: "none" }]);
    expect(await violatedBy(loop, "tip_in")).toContain("tip_in_overshoot");
  });

  it("with reversed sign: the target is not reached", async () => {
    const loop = exampleLoop();
    const { structure, calibration } = lowerSpec(loop, "");
    const reversed = Object.fromEntries(
      ["proportionalGain", "integralGain", "derivativeGain"].map((name) => [
        name,
        -Number(calibration[name]),
      ]),
    );
    const port = portFromRuntime({ structure, calibration: { ...calibration, ...reversed } });
    const ids = await violated(loop, port, ["tip_in", "steps"]);
    expect(ids).toContain("reaches_target");
    expect(ids).toContain("steady_error");
  });

  it("without the guard: the turbo overspeeds", async () => {
    const loop = edited([GUARD, undefined]);
    expect(await violatedBy(loop, "pressure_stuck", "hot_and_high")).toContain("no_overspeed");
  });

  it("with the guard task 200 ms late: the proportional guard does not hold the speed", async () => {
    const late = { kind: "guard_task_delayed", by: "200 ms" };
    const loop = edited(["scenarios.pressure_stuck.faults", [stuck, late]]);
    expect(await violatedBy(loop, "pressure_stuck")).toContain("guard_holds_speed");
  });

  it("with a guard that only trips, every 50 ms: the turbo overspeeds", async () => {
    const seldom = { kind: "guard_task_every", period: "50 ms" };
    const loop = edited(...PROPORTIONAL.map((name) => [`${GUARD}.${name}`, undefined] as const), [
      "scenarios.pressure_stuck.faults",
      [stuck, seldom],
    ]);
    expect(await violatedBy(loop, "pressure_stuck")).toContain("no_overspeed");
  });

  it("with three times the gain: boost does not settle", async () => {
    const { proportional, integral, derivative } = exampleLoop().controller.feedback;
    const tripled = Object.entries({ proportional, integral, derivative }).map(([name, gain]) => {
      if (gain?.kind !== "number") throw new Error(`${name} of the example is not one number`);
      const [number, unit] = gain.quantity.written.split(" ");
      return [`controller.feedback.${name}`, `${3 * Number(number)} ${unit}`] as const;
    });
    expect(await violatedBy(edited(...tripled), "steps", "tip_in")).toContain("stays_settled");
  });
});
