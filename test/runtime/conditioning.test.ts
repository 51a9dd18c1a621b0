import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { debounce, movedTooFast, outsideRange, standsStill, usable } from "../../runtime/plausibility.ts";
import { conditionAmbientPressure, conditionBoostPressure } from "../../runtime/slow-signals.ts";
import { judgeTurboSpeed } from "../../runtime/turbo-speed.ts";
import { CALIBRATION, fastState, STRUCTURE, slowState } from "./fixtures.ts";

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

  const check = { mostChange: 80, windowSteps: 4 };

  test("a ramp at the stated rate is believed", () => {
    const ramp = slowState().boostPressureRate;
    for (let k = 0; k < 200; k++) {
      expect(movedTooFast(check, ramp, 100 + k * 20, false, false)).toBe(false);
    }
  });

  test("a jump is doubted in its first sample and stays doubted, however long it stands, until the signal has failed", () => {
    const jump = slowState().boostPressureRate;
    for (let k = 0; k < 10; k++) movedTooFast(check, jump, 240, false, false);
    for (let k = 0; k < 500; k++) expect(movedTooFast(check, jump, 120, false, false)).toBe(true);
    expect(movedTooFast(check, jump, 238, false, false)).toBe(false);
  });

  test("after the failure a level becomes believable once the rate could have led there", () => {
    const jump = slowState().boostPressureRate;
    for (let k = 0; k < 10; k++) movedTooFast(check, jump, 240, false, false);
    // 120 kPa at 20 kPa per step: believable about 6 steps after the anchor
    const verdicts = Array.from({ length: 12 }, () => movedTooFast(check, jump, 120, false, true));
    expect(verdicts[0]).toBe(true);
    expect(verdicts[11]).toBe(false);
  });

  test("a gap without samples allows the change that the rate allows over the gap", () => {
    const gap = slowState().boostPressureRate;
    for (let k = 0; k < 10; k++) movedTooFast(check, gap, 100, false, false);
    for (let k = 0; k < 20; k++) movedTooFast(check, gap, Number.NaN, true, false);
    expect(movedTooFast(check, { ...gap }, 500, false, false)).toBe(false);
    expect(movedTooFast(check, { ...gap }, 700, false, false)).toBe(true);
  });

  test("a turbo sensor that drops to zero or to half is failed after its debounce, not believed", () => {
    for (const wrong of [0, 70000]) {
      const state = fastState();
      const step = (raw: number) => judgeTurboSpeed(STRUCTURE, CALIBRATION, state, raw, 200);
      for (let k = 0; k < 100; k++) step(140000);
      for (let k = 0; k < 31; k++) step(wrong);
      expect(state.turboSpeed.failed).toBe(true);
      expect(state.turboSpeed.lastGood).toBe(140000);
    }
  });

  test("a companion that is not known yet gives no verdict", () => {
    const state = slowState().boostPressureStuck;
    standsStill({ steps: 5, moved: 5 }, state, 0, 0);
    for (let k = 0; k < 50; k++) expect(standsStill({ steps: 5, moved: 5 }, state, 0, 100)).toBe(false);
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
