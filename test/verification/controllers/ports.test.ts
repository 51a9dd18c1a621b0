import { describe, expect, it } from "vitest";
import { type ControllerPort, newTrace, plantParameters, runLoop } from "../../../hil-sim/index.ts";
import type { LoopSpec, TraceSignal } from "../../../spec/index.ts";
import { drawRun, loadController, scenarioOf, setInSpec } from "../../../verification/index.ts";
import { exampleLoop, exampleText, generatedController, runtimePort } from "../example-loop.ts";

const SIGNALS: TraceSignal[] = [
  "boost_pressure",
  "boost_wanted",
  "boost_target",
  "wastegate_command",
  "torque_limit",
  "guard_active",
  "tripped",
];

function tracedRun(loop: LoopSpec, port: ControllerPort, name: string, changes = {}) {
  const scenario = loop.scenarios.find((each) => each.name === name);
  if (!scenario || !loop.plant) throw new Error(`the example has no scenario ${name}`);
  const drawn = { ...scenarioOf(scenario, drawRun(scenario, 0, 1, 0)), ...changes };
  const trace = newTrace(SIGNALS, drawn.duration, true);
  const { sensors, validity } = loop.plant;
  const plant = { parameters: plantParameters(loop.plant), sensors, validity };
  runLoop(plant, drawn, port, trace, { restOpening: loop.controller.actuator.restOpening.value });
  return trace;
}

const example = exampleLoop();

describe("a generated controller in the loop", () => {
  it("at float64 does what the runtime does, to the bit, sample by sample", async () => {
    const loop = exampleLoop(setInSpec(exampleText(), "controller.precision", "float64"));
    const generated = await loadController(generatedController(loop), loop);
    const runtime = runtimePort(loop);
    for (const name of ["steps", "pressure_stuck", "speed_sweep"]) {
      const one = tracedRun(loop, generated, name);
      const two = tracedRun(loop, runtime, name);
      expect(one.length).toBe(two.length);
      for (const signal of SIGNALS)
        expect(one.signals[signal], `${name} ${signal}`).toEqual(two.signals[signal]);
      expect(one.mode).toEqual(two.mode);
    }
  });

  it("at float32 stays within 0.2 kPa of the runtime's double precision, and is not the same", async () => {
    const generated = await loadController(generatedController(example), example);
    const one = tracedRun(example, generated, "steps").signals.boost_pressure ?? [];
    const two = tracedRun(example, runtimePort(example), "steps").signals.boost_pressure ?? [];
    const apart = Array.from(one, (value, k) => Math.abs(value - two[k]));
    expect(Math.max(...apart)).toBeLessThan(0.2);
    expect(Math.max(...apart)).toBeGreaterThan(0);
  });

  it("starts each run afresh: a posed target and lifted ceilings do not reach the next run", async () => {
    const port = await loadController(generatedController(example), example);
    const before = tracedRun(example, port, "tip_in_low");
    tracedRun(example, port, "speed_sweep");
    const after = tracedRun(example, port, "tip_in_low");
    expect(after.signals.boost_wanted).toEqual(before.signals.boost_wanted);
    expect(Math.max(...(before.signals.boost_wanted ?? []))).toBeLessThanOrEqual(245);
  });
});

describe("a posed target", () => {
  const wantedAtEnd = (loop: LoopSpec, name: string, changes = {}) => {
    const trace = tracedRun(loop, runtimePort(loop), name, changes);
    return trace.signals.boost_wanted?.[trace.length - 1] ?? Number.NaN;
  };

  it("replaces table and compensation, under the ceilings or without them", () => {
    expect(wantedAtEnd(example, "tip_in")).toBe(240);
    const high = { target: [{ at: 0, value: 300, over: 0 }] };
    expect(wantedAtEnd(example, "tip_in", high)).toBe(245);
    expect(wantedAtEnd(example, "speed_sweep", high)).toBe(300);
  });

  it.each([
    ["kPa gauge", [0, 20, 40, 60, 80, 139]],
    ["", [1, 1.2, 1.5, 1.8, 2, 2.4]],
  ])("is the same absolute pressure when the table is in %j", (unit, row) => {
    const table = example.controller.target.boost;
    const values = table.rows.map(() => row);
    const text = setInSpec(exampleText(), "controller.target.boost.values", values);
    const loop = exampleLoop(setInSpec(text, "controller.target.boost.unit", unit));
    expect(wantedAtEnd(loop, "tip_in", { sensorNoise: 0 })).toBeCloseTo(240, 6);
  });
});
