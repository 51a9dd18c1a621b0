import { describe, expect, test } from "vitest";
import { standardPressure } from "../../../hil-sim/exact-math.ts";
import { runLoop } from "../../../hil-sim/loop/run-loop.ts";
import { startOfRun } from "../../../hil-sim/loop/start-of-run.ts";
import { actOnPlant } from "../../../hil-sim/loop/vehicle-side.ts";
import { newPlantInput } from "../../../hil-sim/plant/plant-input.ts";
import { newPlantState } from "../../../hil-sim/plant/plant-state.ts";
import { newTrace } from "../../../hil-sim/trace.ts";
import { traceHash } from "../../../hil-sim/trace-hash.ts";
import type { TraceSignal } from "../../../spec/requirement-spec.ts";
import { TRACE_SIGNALS } from "../../../spec/requirement-spec.ts";
import { engineA, engineB } from "../engines.ts";
import { fixedPort, plainPort } from "../ports.ts";
import { held, plantOf, pull } from "../scenarios.ts";

const a = plantOf(engineA);
const ALL = Object.keys(TRACE_SIGNALS) as TraceSignal[];
const REST = { restOpening: 1 };

function run(scenario = pull(), port = plainPort(160_000), plant = a) {
  const trace = newTrace(ALL, scenario.duration, true);
  const summary = runLoop(plant, scenario, port, trace, REST);
  const signal = (name: TraceSignal) => trace.signals[name]?.subarray(0, trace.length) ?? new Float64Array();
  return { trace, summary, signal };
}

describe("a run", () => {
  test("starts in equilibrium at the first wanted boost and stays there", () => {
    const { signal, summary } = run(
      pull(),
      fixedPort({ wastegateCommandRatio: startOfRun(a.parameters, pull(), 1).wastegateOpening }),
    );
    const boost = signal("boost_pressure");
    expect(boost[0]).toBeCloseTo(200, 3);
    expect(Math.max(...boost.map((x) => Math.abs(x - 200)))).toBeLessThan(0.01);
    expect(summary).toMatchObject({
      milliseconds: 2000,
      clamps: 0,
      sawNotANumber: false,
      leftValidity: false,
    });
  });

  test("without a wanted boost starts with the gate at rest, with a start boost at that boost", () => {
    const { target: _, ...free } = pull({ accelerator: held(0.3) });
    expect(startOfRun(a.parameters, free, 0.8).wastegateOpening).toBe(0.8);
    const from = startOfRun(a.parameters, { ...free, accelerator: held(1), startBoostKpa: 180 }, 0.8);
    expect(from.boostPressure / 1000).toBeCloseTo(180, 3);
  });

  test("out of reach starts at the nearer end stop", () => {
    const far = pull({ target: held(400), engineSpeed: { kind: "imposed", course: held(2000) } });
    expect(startOfRun(a.parameters, far, 1).wastegateOpening).toBe(0);
  });

  test("follows a target under a plain controller, both engines", () => {
    const target = [
      { at: 0, value: 160, over: 0 },
      { at: 0.5, value: 200, over: 0 },
    ];
    for (const plant of [a, plantOf(engineB)]) {
      const { signal } = run(pull({ duration: 8, target }), plainPort(250_000), plant);
      expect(signal("boost_pressure")[8000]).toBeCloseTo(200, 0);
      expect(signal("boost_wanted")[499]).toBe(160);
      expect(signal("boost_wanted")[500]).toBe(200);
    }
  });

  test("takes altitude and temperature from the scenario", () => {
    const high = pull({ ambient: { temperature: 310, altitude: 2000 } });
    const { signal } = run(high);
    expect(signal("ambient_pressure")[100] * 1000).toBeCloseTo(standardPressure(2000), -2);
  });

  test("imposes engine speed by course, ramps included", () => {
    const course = [...held(3000), { at: 0.5, value: 5000, over: 1 }];
    const { signal } = run(pull({ engineSpeed: { kind: "imposed", course } }));
    const speed = signal("engine_speed");
    expect(speed[500]).toBeCloseTo(3000, 6);
    expect(speed[1000]).toBeCloseTo(4000, 6);
    expect(speed[1500]).toBeCloseTo(5000, 6);
  });

  test("lets the vehicle's inertia move a free engine", () => {
    const { signal } = run(pull({ engineSpeed: { kind: "vehicle", fromRpm: 3000 }, duration: 1 }));
    const speed = signal("engine_speed");
    expect(speed[0]).toBeCloseTo(3000, 6);
    // torque of about 350 N·m on 1.6 kg·m2: some 2000 rpm per second
    expect(speed[1000]).toBeGreaterThan(4200);
    expect(speed[1000]).toBeLessThan(5500);
  });

  test("flags a run that leaves the plant's validity", () => {
    const wild = pull({ engineSpeed: { kind: "imposed", course: held(6000) }, duration: 3 });
    const { summary } = run(wild, fixedPort({ wastegateCommandRatio: 0 }));
    expect(summary.leftValidity).toBe(true);
  });

  test("resets the controller, then lifts its ceilings if told to, and poses each new target once", () => {
    const target = [...held(180), { at: 0.5, value: 200, over: 0 }];
    const asked = (ceilings: boolean) => {
      const port = fixedPort();
      run(pull({ target, ceilings, duration: 1 }), port);
      return port.calls.filter((call) => call !== "guard" && call !== "boost");
    };
    expect(asked(true)).toEqual(["reset", "target 180", "target 200"]);
    expect(asked(false)).toEqual(["reset", "ceilings", "target 180", "target 200"]);
  });

  test("refuses a trace that is too short", () => {
    expect(() => runLoop(a, pull(), plainPort(1e6), newTrace(["boost_pressure"], 1), REST)).toThrow(
      /shorter/,
    );
  });
});

describe("the vehicle side", () => {
  test("caps the throttle by the torque limit and cuts fuel at limit 0", () => {
    const limited = run(pull(), fixedPort({ torqueLimitRatio: 0.1, wastegateCommandRatio: 0.5 }));
    const cut = run(pull(), fixedPort({ torqueLimitRatio: 0, wastegateCommandRatio: 0.5 }));
    expect(limited.signal("manifold_pressure")[1000]).toBeLessThan(60);
    expect(limited.summary.finalState.throttleOpening).toBeCloseTo(0.1, 3);
    expect(cut.signal("engine_torque")[2000]).toBeLessThan(0);
  });

  test.each([
    ["permitted above 1500 rpm with the foot off", 3000, 0.01, true, 0],
    ["not with the foot on", 3000, 0.05, true, 1],
    ["not unless the controller permits", 3000, 0.01, false, 1],
    ["not at low speed", 1400, 0.01, true, 1],
  ])("cuts fuel on overrun: %s", (_what, rpm, acceleratorRatio, fuelCutPermitted, fuel) => {
    const port = fixedPort({ fuelCutPermitted });
    const state = { ...newPlantState(), engineSpeed: (rpm * Math.PI) / 30 };
    const input = newPlantInput();
    actOnPlant({ ...port.input, acceleratorRatio }, port.output, state, input);
    expect(input.fuel).toBe(fuel);
    expect(input.throttleCommand).toBe(acceleratorRatio);
  });

  test("cuts fuel at torque limit 0, foot on or off", () => {
    const port = fixedPort({ torqueLimitRatio: 0 });
    const input = newPlantInput();
    actOnPlant({ ...port.input, acceleratorRatio: 1 }, port.output, newPlantState(), input);
    expect(input.fuel).toBe(0);
    expect(input.throttleCommand).toBe(0);
  });

  test("moves the bypass by its command", () => {
    const { summary } = run(pull(), fixedPort({ bypassCommandRatio: 0.7, wastegateCommandRatio: 0.3 }));
    expect(summary.finalState.bypassOpening).toBeCloseTo(0.7, 6);
  });
});

describe("determinism", () => {
  const noisy = pull({ sensorNoise: 1, target: [...held(180), { at: 0.3, value: 220, over: 0.1 }] });

  test("equal runs have equal bits, a different seed has not", () => {
    const first = traceHash(run(noisy).trace);
    expect(traceHash(run(noisy).trace)).toBe(first);
    expect(traceHash(run({ ...noisy, noiseSeed: 2 }).trace)).not.toBe(first);
  });

  test("what is recorded does not change the run, nor does the use of a kept start", () => {
    const all = run(noisy);
    const few = newTrace(["boost_pressure"], 5);
    const state = startOfRun(a.parameters, noisy, 1);
    runLoop(a, noisy, plainPort(160_000), few, { restOpening: 1, state });
    expect(Array.from(few.signals.boost_pressure?.subarray(0, few.length) ?? [])).toEqual(
      Array.from(all.signal("boost_pressure")),
    );
  });

  test("this run has the same hash on every machine", () => {
    expect(traceHash(run(noisy).trace)).toMatchInlineSnapshot(`"c81b63c1"`);
  });
});
