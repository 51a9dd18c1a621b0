import { describe, expect, test } from "vitest";
import type { FixedFault } from "../../hil-sim/drawn-scenario.ts";
import { applyFaults, FAULT_KINDS, newLoopFaults } from "../../hil-sim/faults.ts";
import { runLoop } from "../../hil-sim/loop/run-loop.ts";
import { newPlantFaults, type PlantFaults } from "../../hil-sim/plant/plant-input.ts";
import { wastegateArea } from "../../hil-sim/plant/wastegate.ts";
import { openingForBoost } from "../../hil-sim/steady/opening-for-boost.ts";
import { newTrace } from "../../hil-sim/trace.ts";
import { FAULTS } from "../../spec/index.ts";
import { engineA } from "./engines.ts";
import { wideOpen } from "./points.ts";
import { fixedPort } from "./ports.ts";
import { plantOf, pull } from "./scenarios.ts";

const a = plantOf(engineA);

function fault(kind: string, values: FixedFault["values"] = {}, from = 0.5, lasting = 1): FixedFault {
  return { kind, from, lasting, values };
}

/** What the controller read at each slow step of a two-second pull, and the trace. */
function underFault(one: FixedFault, command = 0.25) {
  const port = fixedPort({ wastegateCommandRatio: command });
  const trace = newTrace(
    ["boost_measured", "turbo_speed_measured", "wastegate_opening", "boost_pressure"],
    2,
  );
  runLoop(a, pull({ faults: [one] }), port, trace, { restOpening: 1 });
  const read = (name: keyof typeof trace.signals) => trace.signals[name]?.subarray(0, trace.length) ?? [];
  return { port, read };
}

test("every kind the spec language knows is a kind here, with the same fields of its own", () => {
  expect(Object.keys(FAULT_KINDS).sort()).toEqual(Object.keys(FAULTS).sort());
  for (const [kind, { fields }] of Object.entries(FAULT_KINDS)) {
    const own = Object.keys(FAULTS[kind as keyof typeof FAULTS]).filter(
      (key) => key !== "at" && key !== "for",
    );
    expect(Object.keys(fields), kind).toEqual(own);
  }
});

describe("a fault", () => {
  test("is in force from its start up to but not at its end", () => {
    const at = (time: number) => {
      const loop = newLoopFaults();
      applyFaults([fault("boost_pressure_lost")], time, loop, newPlantFaults());
      return loop.boostLost;
    };
    expect([0.499, 0.5, 1.499, 1.5].map(at)).toEqual([false, true, true, false]);
  });

  test("of unknown kind is refused by name", () => {
    expect(() => applyFaults([fault("gremlins")], 1, newLoopFaults(), newPlantFaults())).toThrow(/gremlins/);
  });

  test("joins others: leaks add up, factors multiply", () => {
    const plant = newPlantFaults();
    const both = [
      fault("boost_leak", { area: 1e-4 }),
      fault("boost_leak", { area: 5e-5 }),
      fault("clogged_filter", { factor: 2 }),
      fault("clogged_filter", { factor: 3 }),
    ];
    applyFaults(both, 1, newLoopFaults(), plant);
    expect(plant.boostLeakArea).toBeCloseTo(1.5e-4, 12);
    expect(plant.airFilterFactor).toBe(6);
    applyFaults(both, 2, newLoopFaults(), plant);
    expect(plant).toEqual(newPlantFaults());
  });
});

describe("a sensor fault in the loop", () => {
  test("boost pressure stuck reads its value while it lasts, the truth before and after", () => {
    const { read } = underFault(fault("boost_pressure_stuck", { value: 120 }));
    const measured = read("boost_measured");
    expect(measured[499]).toBeGreaterThan(190);
    expect(new Set(measured.slice(500, 1500))).toEqual(new Set([120]));
    expect(measured[1500]).toBeGreaterThan(190);
  });

  test("turbo speed stuck without a value stays at its present one, though the turbo slows", () => {
    const { read } = underFault(fault("turbo_speed_stuck"), 0.6);
    const measured = read("turbo_speed_measured");
    expect(new Set(measured.slice(500, 1500)).size).toBe(1);
    expect(measured[500]).toBeGreaterThan(measured[1500] + 5000);
    expect(Math.abs(measured[500] - measured[499])).toBeLessThanOrEqual(1000);
  });

  test.each([
    ["boost_pressure_lost", "boost_measured"],
    ["turbo_speed_lost", "turbo_speed_measured"],
  ] as const)("%s reads not a number", (kind, signal) => {
    const measured = underFault(fault(kind)).read(signal);
    expect([499, 500, 1499, 1500].map((k) => Number.isNaN(measured[k]))).toEqual([false, true, true, false]);
  });
});

describe("a gate fault in the loop", () => {
  test("stuck keeps its opening whatever the command, then moves again", () => {
    const opening = underFault(fault("wastegate_stuck", {}, 0, 1), 0.9).read("wastegate_opening");
    expect(new Set(opening.slice(0, 1000)).size).toBe(1);
    expect(opening[1300]).toBeGreaterThan(0.85);
  });

  test("slow by 3 takes about three times as long", () => {
    const reaches = (one: FixedFault) =>
      Array.from(underFault(one, 0.9).read("wastegate_opening")).findIndex((x) => x > 0.8);
    const healthy = reaches(fault("boost_leak", { area: 0 }));
    const slow = reaches(fault("wastegate_slow", { factor: 3 }, 0, 2));
    expect(slow / healthy).toBeGreaterThan(2.5);
    expect(slow / healthy).toBeLessThan(3.5);
  });
});

test.each([
  ["guard_task_delayed", { by: 0.2 }, 5],
  ["guard_task_every", { period: 0.1 }, 10],
])("%s makes the guard rare while it lasts", (kind, values, inForce) => {
  const { port } = underFault(fault(kind, values, 0, 1));
  const guards = port.calls.filter((call) => call === "guard").length;
  // 500 runs in the second after the fault, give or take the one in progress.
  expect(Math.abs(guards - 500 - inForce)).toBeLessThanOrEqual(2);
});

// Source: plant design figures at 5000 rpm and 2.4 bar, measured with an independent implementation on engine A: shift
// of the effective gate area (mm2) against the healthy map, and of turbo speed (krpm).
describe("the steady signature of a plant fault", () => {
  const find = (faults: Partial<PlantFaults>) => {
    const point = { ...wideOpen(5000), faults: { ...newPlantFaults(), ...faults } };
    const { opening, state } = openingForBoost(a.parameters, point, 240e3);
    return {
      area: wastegateArea(a.parameters, opening) * 1e6,
      krpm: (state.turboSpeed * 30) / Math.PI / 1000,
    };
  };
  const healthy = find({});

  test.each([
    ["boost leak 50 mm2", { boostLeakArea: 50e-6 }, -64, 3.2],
    ["boost leak 100 mm2", { boostLeakArea: 100e-6 }, -127, 6.8],
    ["boost leak 200 mm2", { boostLeakArea: 200e-6 }, -252, 15.7],
    ["exhaust leak 50 mm2", { exhaustLeakArea: 50e-6 }, -46, 0],
    ["exhaust leak 100 mm2", { exhaustLeakArea: 100e-6 }, -93, 0],
    ["filter clogged fourfold", { airFilterFactor: 4 }, -30, 4],
    ["turbine efficiency down 10 %", { turbineEfficiencyFactor: 0.9 }, -53, 0],
  ])("of %s", (_name, faults, area, krpm) => {
    const found = find(faults);
    expect(Math.abs(found.area - healthy.area - area)).toBeLessThan(Math.max(1.5, 0.02 * Math.abs(area)));
    expect(Math.abs(found.krpm - healthy.krpm - krpm)).toBeLessThan(0.25);
  });
});
