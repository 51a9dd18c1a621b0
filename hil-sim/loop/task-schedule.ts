import type { ControllerPort } from "../controller-port.ts";
import type { LoopFaults } from "../faults.ts";
import { wholeMilliseconds } from "../milliseconds.ts";

/** When the controller's two tasks run next, in whole milliseconds. */
export interface TaskSchedule {
  readonly guardEvery: number;
  readonly slowEvery: number;
  guardDue: number;
  slowDue: number;
}

export function newTaskSchedule(port: ControllerPort): TaskSchedule {
  return {
    guardEvery: wholeMilliseconds(port.guardStep),
    slowEvery: wholeMilliseconds(port.step),
    guardDue: 0,
    slowDue: 0,
  };
}

/** Runs what is due; the guard first. A delayed guard starts late each time and is due a step after it started. */
export function runDueTasks(
  schedule: TaskSchedule,
  millisecond: number,
  faults: LoopFaults,
  port: ControllerPort,
): void {
  if (millisecond >= schedule.guardDue + faults.guardDelay) {
    port.stepGuard();
    schedule.guardDue = millisecond + Math.max(schedule.guardEvery, faults.guardPeriod);
  }
  if (millisecond >= schedule.slowDue) {
    port.stepBoost();
    schedule.slowDue = millisecond + schedule.slowEvery;
  }
}
