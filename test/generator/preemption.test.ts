import { describe, expect, test } from "vitest";
import { interpretedModule, type StructObject } from "../../generator/index.ts";
import { compileSpec, exampleSpec, runtimeText } from "../agreement/compile-spec.ts";
import { SKARN24 } from "../support/smallest.ts";

// The fast task interrupts the slow one anywhere. The interpreted slow step is interrupted after every statement in
// turn, and the guard must hold at each: design rule of the exchange (one writer per field, flags before values).

const program = compileSpec(exampleSpec(SKARN24), runtimeText());

interface Drive {
  readonly boost: number;
  readonly speed: number;
}

/** A controller whose slow step calls `interrupt` after every statement. */
const controller = () => {
  let interrupt = (): void => undefined;
  const interrupted = interpretedModule(program, () => interrupt());
  const plain = interpretedModule(program);
  const create = (struct: string): StructObject => plain.create(struct);
  const objects = {
    Calibration: plain.createCalibration(),
    SlowState: create("SlowState"),
    FastState: create("FastState"),
    Exchange: create("Exchange"),
    SlowInput: create("SlowInput"),
    FastInput: create("FastInput"),
    SlowOutput: create("SlowOutput"),
    FastOutput: create("FastOutput"),
  };
  const fast = plain.bind("stepGuard", objects);
  const slow = interrupted.bind("stepBoost", objects);
  plain.bind("initialise", objects)();
  const drive = ({ boost, speed }: Drive): void => {
    Object.assign(objects.SlowInput, {
      engineSpeedRpm: 5000,
      acceleratorRatio: 1,
      boostPressureKpa: boost,
      ambientPressureKpa: 100,
      chargeTemperatureK: 313,
    });
    objects.FastInput.turboSpeedRpm = speed;
  };
  /** Runs one slow step, interrupted once, after its statement number `at`; false when it has fewer statements. */
  const stepInterrupted = (at: number, action: () => void): boolean => {
    let statement = 0;
    let happened = false;
    interrupt = () => {
      if (statement++ === at) {
        happened = true;
        action();
      }
    };
    slow();
    interrupt = () => undefined;
    return happened;
  };
  const settle = (state: Drive, steps: number): void => {
    drive(state);
    for (let i = 0; i < steps; i++) {
      fast();
      slow();
    }
  };
  return { objects, fast, drive, settle, stepInterrupted };
};

const HEALTHY: Drive = { boost: 150, speed: 120_000 };
const OVER: Drive = { boost: 150, speed: 166_000 };
const LOST: Drive = { boost: Number.NaN, speed: 120_000 };

/** Interruption points from the first statement until the step has no more. */
const everyPoint = (visit: (at: number) => boolean): number => {
  let at = 0;
  while (visit(at)) at += 1;
  return at;
};

describe("a slow step interrupted after any of its statements", () => {
  test("over the limit, the gate is fully open and torque limited in that very fast step", () => {
    const points = everyPoint((at) => {
      const { objects, fast, drive, settle, stepInterrupted } = controller();
      settle(HEALTHY, 40);
      drive(OVER);
      const happened = stepInterrupted(at, fast);
      if (happened) {
        expect(objects.FastOutput.overLimit, `point ${at}`).toBe(true);
        expect(objects.FastOutput.wastegateCommandRatio, `point ${at}`).toBe(1);
        expect(objects.FastOutput.torqueLimitRatio, `point ${at}`).toBeLessThanOrEqual(Math.fround(0.4));
      }
      return happened;
    });
    expect(points).toBeGreaterThan(100);
  });

  test("losing the boost signal, the fast step sees the healthy state or fail-safe, never a mixture", () => {
    const points = everyPoint((at) => {
      const { objects, fast, settle, drive, stepInterrupted } = controller();
      settle(HEALTHY, 40);
      // ten steps of debounce (50 ms) are needed before the signal has failed: the interrupted step is the one that finds it
      settle(LOST, 10);
      fast();
      const before = { ...objects.FastOutput };
      drive(LOST);
      const happened = stepInterrupted(at, fast);
      const between = { ...objects.FastOutput };
      fast();
      const after = { ...objects.FastOutput };
      if (happened) {
        expect(before.failSafe).toBe(false);
        expect(after.failSafe).toBe(true);
        const seen = between.failSafe ? after : before;
        expect(between.torqueLimitRatio, `point ${at}`).toBe(seen.torqueLimitRatio);
        expect(between.wastegateCommandRatio, `point ${at}`).toBe(seen.wastegateCommandRatio);
      }
      return happened;
    });
    expect(points).toBeGreaterThan(100);
  });
});
