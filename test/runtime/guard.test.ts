import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { stepGuard } from "../../runtime/index.ts";
import { CALIBRATION, exchange, fastOutput, fastState, STRUCTURE } from "./fixtures.ts";

/** A running guard: the slow step wants `wanted`, the base of the floor is 250 mm2. */
function guard(wanted = 0.1) {
  const state = fastState();
  const shared = { ...exchange(), wantedOpeningRatio: wanted, guardBase: 250, acceleratorRatio: 1 };
  const output = fastOutput();
  const step = (turboSpeedRpm: number, structure = STRUCTURE) => {
    stepGuard(structure, CALIBRATION, state, shared, { turboSpeedRpm }, output);
    return { ...output };
  };
  return { state, shared, step };
}

const settle = (g: ReturnType<typeof guard>, speed: number, steps = 100) => {
  let last = g.step(speed);
  for (let i = 1; i < steps; i++) {
    last = g.step(speed);
  }
  return last;
};

/** Moves the speed by at most 400 rpm per step, which the rate check believes. */
const ramp = (g: ReturnType<typeof guard>, from: number, to: number) => {
  const steps = Math.ceil(Math.abs(to - from) / 400);
  for (let k = 1; k <= steps; k++) g.step(from + ((to - from) * k) / steps);
};

const anySpeed = fc.oneof(
  { weight: 4, arbitrary: fc.double({ min: 0, max: 260000, noNaN: true }) },
  {
    weight: 1,
    arbitrary: fc.constantFrom(
      Number.NaN,
      Number.POSITIVE_INFINITY,
      Number.NEGATIVE_INFINITY,
      -0,
      -1,
      1e300,
      5e-324,
    ),
  },
);

describe("overspeed guard", () => {
  test("leaves the gate alone while the turbo is slow", () => {
    const out = settle(guard(0.1), 90000);
    expect(out.wastegateCommandRatio).toBe(0.1);
    expect(out.torqueLimitRatio).toBe(1);
    expect(out.guardActive).toBe(false);
  });

  test("for any readings, outputs are finite and in range, and over the limit opens the gate and limits torque at once", () => {
    fc.assert(
      fc.property(
        fc.array(anySpeed, { minLength: 1, maxLength: 120 }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (raws, wanted) => {
          const g = guard(wanted);
          return raws.every((raw) => {
            const out = g.step(raw);
            const inRange =
              out.wastegateCommandRatio >= 0 &&
              out.wastegateCommandRatio <= 1 &&
              out.torqueLimitRatio >= 0 &&
              out.torqueLimitRatio <= 1 &&
              Number.isFinite(out.guardFloor);
            const mustTrip = Number.isFinite(raw) && raw >= CALIBRATION.speedLimitRpm;
            const safe =
              out.wastegateCommandRatio === 1 && out.torqueLimitRatio <= CALIBRATION.tripTorqueRatio;
            return inRange && (!mustTrip || out.overLimit) && (!out.overLimit || safe);
          });
        },
      ),
    );
  });

  test("never closes the gate further than the slow step wants", () => {
    fc.assert(
      fc.property(
        fc.array(anySpeed, { maxLength: 80 }),
        fc.double({ min: 0, max: 1, noNaN: true }),
        (raws, wanted) => {
          const g = guard(wanted);
          return raws.every((raw) => {
            const out = g.step(raw);
            return out.failSafe || out.wastegateCommandRatio >= wanted;
          });
        },
      ),
    );
  });

  test("the floor starts from its base, not from closed: at the reference speed it holds the base area", () => {
    const out = settle(guard(0), CALIBRATION.guardReferenceSpeedRpm);
    expect(out.guardFloor).toBeCloseTo(250, 6);
    expect(out.guardActive).toBe(true);
  });

  test("1 krpm above the reference raises the floor by the gain, and more with time", () => {
    const g = guard(0);
    settle(g, 157000, 200);
    const early = settle(g, 159000, 60);
    expect(early.guardFloor).toBeGreaterThan(250 + 20.9 - 1e-9);
    const later = settle(g, 159000, 1000);
    expect(later.guardFloor).toBeGreaterThan(early.guardFloor + 15);
  });

  test("trips when the speed has stood at the ceiling for the stated time, not before", () => {
    const g = guard();
    settle(g, 150000);
    const over = CALIBRATION.speedCeilingRpm + 100;
    expect(g.step(over).overLimit).toBe(false);
    expect(g.step(over).overLimit).toBe(false);
    expect(g.step(over).overLimit).toBe(true);
  });

  test("stays latched until slow for the stated time and the driver has lifted", () => {
    const g = guard();
    settle(g, 158000);
    g.step(166000);
    ramp(g, 158000, 140000);
    expect(settle(g, 140000, 2000).overLimit).toBe(true);
    g.shared.acceleratorRatio = 0;
    expect(g.step(140000).overLimit).toBe(false);
  });

  test("releases without a lift once the stated time has passed", () => {
    const g = guard();
    settle(g, 158000);
    g.step(166000);
    ramp(g, 158000, 140000);
    expect(settle(g, 140000, 2940).overLimit).toBe(true);
    expect(settle(g, 140000, 100).overLimit).toBe(false);
  });

  test("a reading above the believable range trips when the turbo was in the guard's band, and is doubted otherwise", () => {
    const high = guard();
    settle(high, 158500);
    expect(high.step(250000).overLimit).toBe(true);
    const infinite = guard();
    settle(infinite, 158500);
    expect(infinite.step(Number.POSITIVE_INFINITY).overLimit).toBe(true);
    const low = guard();
    settle(low, 100000);
    const out = low.step(Number.POSITIVE_INFINITY);
    expect(out.overLimit).toBe(false);
    expect(out.turboSpeedSuspect).toBe(true);
  });

  test("while the sensor is silent the guard assumes the fastest plausible gain", () => {
    const g = guard(0);
    settle(g, 150000);
    let trippedAt = -1;
    for (let k = 0; k < 25 && trippedAt < 0; k++) {
      if (g.step(Number.NaN).overLimit) {
        trippedAt = k;
      }
    }
    // 150 000 + k * 600 rpm reaches 160 050 rpm at k = 17, and the trip waits 2 ms more
    expect(trippedAt).toBe(18);
  });

  test("a gap shorter than the debounce is no acceleration: the floor rises only by the assumed gain", () => {
    const g = guard(0);
    settle(g, 143000, 200);
    for (let k = 0; k < 10; k++) g.step(Number.NaN);
    expect(g.shared.targetReductionKpa).toBe(0);
    const back = g.step(143000);
    expect(back.guardFloor).toBeLessThan(250);
    expect(back.overLimit).toBe(false);
  });

  test("a first reading that is bad starts neither filter nor history", () => {
    const g = guard(0);
    g.step(Number.NaN);
    expect(settle(g, 140000, 200).overLimit).toBe(false);
    expect(g.shared.targetReductionKpa).toBe(0);
  });

  test("a silent sensor leads to fail-safe: safe opening and limited torque", () => {
    const g = guard(0);
    settle(g, 100000);
    const out = settle(g, Number.NaN, 40);
    expect(out.failSafe).toBe(true);
    expect(out.wastegateCommandRatio).toBe(CALIBRATION.safeOpeningRatio);
    expect(out.torqueLimitRatio).toBe(CALIBRATION.failSafeTorqueRatio);
    expect(g.shared.turboSpeedFailed).toBe(true);
  });

  test("asks the slow step for less boost in proportion to the excess and gives it back slowly", () => {
    const g = guard(0);
    settle(g, 157000, 200);
    settle(g, 159000, 60);
    const taken = g.shared.targetReductionKpa;
    expect(taken).toBeGreaterThanOrEqual(4 - 1e-9);
    g.step(158800);
    expect(g.shared.targetReductionKpa).toBeGreaterThan(taken - 0.05);
    ramp(g, 158800, 150000);
    settle(g, 150000, 1500);
    expect(g.shared.targetReductionKpa).toBe(0);
  });

  test("without a proportional part only the trip acts", () => {
    const g = guard(0.1);
    const structure = { ...STRUCTURE, proportionalGuard: false };
    for (let k = 0; k < 50; k++) {
      g.step(157000, structure);
    }
    let out = g.step(159500, structure);
    for (let k = 0; k < 50; k++) {
      out = g.step(159500, structure);
    }
    expect(out.wastegateCommandRatio).toBe(0.1);
  });
});
