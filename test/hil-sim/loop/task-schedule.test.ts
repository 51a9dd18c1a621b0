import { describe, expect, test } from "vitest";
import { newLoopFaults } from "../../../hil-sim/faults.ts";
import { newTaskSchedule, runDueTasks } from "../../../hil-sim/loop/task-schedule.ts";
import { fixedPort } from "../ports.ts";

function activations(milliseconds: number, faults: Partial<ReturnType<typeof newLoopFaults>> = {}) {
  const port = fixedPort();
  const schedule = newTaskSchedule(port);
  const guard: number[] = [];
  const boost: number[] = [];
  const order: string[] = [];
  for (let k = 0; k < milliseconds; k++) {
    const before = port.calls.length;
    runDueTasks(schedule, k, { ...newLoopFaults(), ...faults }, port);
    const ran = port.calls.slice(before);
    if (ran.includes("guard")) guard.push(k);
    if (ran.includes("boost")) boost.push(k);
    order.push(ran.join(" "));
  }
  return { guard, boost, order };
}

describe("tasks of 2 and 5 ms", () => {
  test("run at 0 and every step from then on, the guard first", () => {
    const { guard, boost, order } = activations(12);
    expect(guard).toEqual([0, 2, 4, 6, 8, 10]);
    expect(boost).toEqual([0, 5, 10]);
    expect(order[0]).toBe("guard boost");
    expect(order[10]).toBe("guard boost");
  });

  test("a delayed guard starts late each time and is due a step after it started", () => {
    expect(activations(12, { guardDelay: 3 }).guard).toEqual([3, 8]);
    expect(activations(12, { guardDelay: 3 }).boost).toEqual([0, 5, 10]);
  });

  test("a guard that runs only every 4 ms does so; a shorter period than its step changes nothing", () => {
    expect(activations(12, { guardPeriod: 4 }).guard).toEqual([0, 4, 8]);
    expect(activations(12, { guardPeriod: 1 }).guard).toEqual([0, 2, 4, 6, 8, 10]);
  });
});
