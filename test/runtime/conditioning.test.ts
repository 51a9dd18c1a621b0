import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { debounce, movedTooFast, outsideRange, standsStill, usable } from "../../runtime/plausibility.ts";
import { conditionAmbientPressure, conditionBoostPressure } from "../../runtime/slow-signals.ts";
import { CALIBRATION, STRUCTURE, slowState } from "./fixtures.ts";

const anyBits = fc.oneof(
  fc.double(),
  fc.constantFrom(Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, 0, -0, 5e-324, 1e308),
);

describe("conditioning of a signal", () => {
  test("a sample that is not finite or outside the range is suspect", () => {
    for (const raw of [Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, 19.9, 350.1]) {
      expect(outsideRange(CALIBRATION.boostPressure, raw)).toBe(true);
    }
    expect(outsideRange(CALIBRATION.boostPressure, 20)).toBe(false);
    expect(outsideRange(CALIBRATION.boostPressure, 350)).toBe(false);
  });

  test("no bit pattern reaches the value: it is finite and inside the range for any history", () => {
    fc.assert(
      fc.property(fc.array(anyBits, { maxLength: 60 }), (raws) => {
        const state = slowState();
        return raws.every((raw) => {
          const value = conditionBoostPressure(STRUCTURE, CALIBRATION, state, raw);
          return value >= 20 && value <= 350 && Number.isFinite(state.boostPressure.lastGood);
        });
      }),
    );
  });

  test("a doubted sample holds the last good one; the signal fails after the stated steps and heals after the stated steps", () => {
    const state = slowState();
    conditionAmbientPressure(STRUCTURE, CALIBRATION, state, 98);
    for (let step = 0; step < CALIBRATION.ambientPressure.afterSteps; step++) {
      expect(conditionAmbientPressure(STRUCTURE, CALIBRATION, state, Number.NaN)).toBe(98);
      expect(state.ambientPressure.failed).toBe(false);
    }
    expect(conditionAmbientPressure(STRUCTURE, CALIBRATION, state, Number.NaN)).toBe(100);
    expect(state.ambientPressure.failed).toBe(true);
    for (let step = 0; step < CALIBRATION.ambientPressure.healsAfterSteps; step++) {
      expect(conditionAmbientPressure(STRUCTURE, CALIBRATION, state, 97)).toBe(100);
    }
    expect(conditionAmbientPressure(STRUCTURE, CALIBRATION, state, 97)).toBe(97);
  });

  test("zero debounce means at once", () => {
    const state = slowState().boostPressure;
    debounce({ low: 0, high: 1, afterSteps: 0, healsAfterSteps: 0 }, state, 2, true);
    expect(state.failed).toBe(true);
    debounce({ low: 0, high: 1, afterSteps: 0, healsAfterSteps: 0 }, state, 0.5, false);
    expect(usable(state)).toBe(true);
  });

  test("counters stop at their limits", () => {
    const state = slowState().boostPressure;
    for (let i = 0; i < 1000; i++) {
      debounce({ low: 0, high: 1, afterSteps: 10, healsAfterSteps: 20 }, state, 2, true);
    }
    expect(state.suspectSteps).toBe(10);
    for (let i = 0; i < 1000; i++) {
      debounce({ low: 0, high: 1, afterSteps: 10, healsAfterSteps: 20 }, state, 0.5, false);
    }
    expect(state.goodSteps).toBe(20);
  });

  test("a ramp at the stated rate is believed, a jump beyond it is not", () => {
    const check = { mostChange: 80, windowSteps: 4 };
    const ramp = slowState().boostPressureRate;
    for (let k = 0; k < 200; k++) {
      expect(movedTooFast(check, ramp, 100 + k * 20)).toBe(false);
    }
    const jump = slowState().boostPressureRate;
    const verdicts = [100, 100, 100, 100, 100, 200, 200, 200, 200].map((p) => movedTooFast(check, jump, p));
    expect(verdicts.some(Boolean)).toBe(true);
  });

  test("a frozen reading is suspect only when the companion moved meanwhile", () => {
    const check = { steps: 5, moved: 5 };
    const moving = slowState().boostPressureStuck;
    const still = slowState().boostPressureStuck;
    let movingVerdict = false;
    let stillVerdict = false;
    for (let k = 0; k < 20; k++) {
      movingVerdict = standsStill(check, moving, 100, 150 + k);
      stillVerdict = standsStill(check, still, 100, 150);
    }
    expect(movingVerdict).toBe(true);
    expect(stillVerdict).toBe(false);
  });
});
