import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { stepBoost } from "../../runtime/index.ts";
import { CALIBRATION, exchange, STRUCTURE, slowOutput, slowState } from "./fixtures.ts";

const INPUT = {
  engineSpeedRpm: 4000,
  acceleratorRatio: 1,
  boostPressureKpa: 200,
  ambientPressureKpa: 100,
  chargeTemperatureK: 298.15,
  boostCeilingRequestKpa: 400,
};

function loop(structure = STRUCTURE, calibration = CALIBRATION) {
  const state = slowState();
  const shared = { ...exchange(), turboSpeedReady: true };
  const output = slowOutput();
  const step = (change: Partial<typeof INPUT> = {}) => {
    stepBoost(structure, calibration, state, shared, { ...INPUT, ...change }, output);
    return { ...output } as Omit<typeof output, "mode"> & { mode: string };
  };
  const hold = (steps: number, change: Partial<typeof INPUT> = {}) => {
    let last = step(change);
    for (let k = 1; k < steps; k++) {
      last = step(change);
    }
    return last;
  };
  return { state, shared, step, hold };
}

const bits = fc.oneof(
  { weight: 5, arbitrary: fc.double({ min: -100, max: 10000, noNaN: true }) },
  { weight: 1, arbitrary: fc.double() },
  {
    weight: 1,
    arbitrary: fc.constantFrom(Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY, -0, 5e-324),
  },
);
const anyInput = fc.record({
  engineSpeedRpm: bits,
  acceleratorRatio: bits,
  boostPressureKpa: bits,
  ambientPressureKpa: bits,
  chargeTemperatureK: bits,
  boostCeilingRequestKpa: bits,
});

describe("slow step", () => {
  test("for any inputs, opening, target and every term stay finite and in range", () => {
    const structures = [
      STRUCTURE,
      { ...STRUCTURE, coordinate: "opening" as const, schedule: "constant" as const },
      {
        ...STRUCTURE,
        antiWindup: "back_calculation" as const,
        airCompensation: true,
        boostCeilingRequest: true,
      },
      { ...STRUCTURE, antiWindup: "none" as const, targetReference: "gauge" as const },
    ];
    fc.assert(
      fc.property(
        fc.constantFrom(...structures),
        fc.array(anyInput, { maxLength: 60 }),
        (structure, inputs) => {
          const l = loop(structure);
          return inputs.every((input) => {
            const out = l.step(input);
            const numbers = [
              out.boostWantedKpa,
              out.boostTargetKpa,
              out.feedforwardTerm,
              out.proportionalTerm,
              out.integralTerm,
              out.derivativeTerm,
            ];
            return (
              numbers.every(Number.isFinite) &&
              out.wantedOpeningRatio >= 0 &&
              out.wantedOpeningRatio <= 1 &&
              out.integralTerm >= -220 &&
              out.integralTerm <= 220
            );
          });
        },
      ),
    );
  });

  test("starts with the gate at its safe opening until pressure and turbo speed are known", () => {
    const l = loop();
    l.shared.turboSpeedReady = false;
    const out = l.step();
    expect(out.mode).toBe("start");
    expect(out.wantedOpeningRatio).toBe(1);
    l.shared.turboSpeedReady = true;
    expect(l.step().mode).toBe("closed_loop");
  });

  test("the target never passes a ceiling and moves no faster than its slew", () => {
    const l = loop();
    l.hold(10, { boostPressureKpa: 120 });
    let previous = l.step({ boostPressureKpa: 120 }).boostTargetKpa;
    for (let k = 0; k < 200; k++) {
      const out = l.step({ boostPressureKpa: 120 });
      expect(out.boostTargetKpa).toBeLessThanOrEqual(245);
      expect(out.boostTargetKpa - previous).toBeLessThanOrEqual(900 * 0.005 + 1e-9);
      previous = out.boostTargetKpa;
    }
    expect(previous).toBe(240);
  });

  test("the pressure-ratio ceiling follows the ambient pressure, and its safe side when the sensor is lost", () => {
    const l = loop();
    expect(l.hold(100, { ambientPressureKpa: 80 }).boostWantedKpa).toBeCloseTo(2.7 * 80, 9);
    expect(l.hold(100, { ambientPressureKpa: Number.NaN }).boostWantedKpa).toBeCloseTo(2.7 * 50, 9);
  });

  test("more boost than wanted opens the gate, less closes it", () => {
    const above = loop().hold(200, { boostPressureKpa: 250 });
    const below = loop().hold(200, { boostPressureKpa: 230 });
    expect(above.wantedOpeningRatio).toBeGreaterThan(below.wantedOpeningRatio);
  });

  test("without a wanted boost the gate rests and the integral fades", () => {
    const l = loop();
    l.hold(100, { boostPressureKpa: 235 });
    expect(l.state.integralTerm).not.toBe(0);
    const out = l.hold(600, { acceleratorRatio: 0, boostPressureKpa: 100 });
    expect(out.mode).toBe("no_boost");
    expect(out.wantedOpeningRatio).toBeCloseTo(0.3, 9);
    expect(Math.abs(l.state.integralTerm)).toBeLessThan(0.01);
  });

  test("a lost pressure sensor leads to fail-safe at the safe opening, and tells the fast step first", () => {
    const l = loop();
    l.hold(50);
    const out = l.hold(20, { boostPressureKpa: Number.NaN });
    expect(out.mode).toBe("fail_safe");
    expect(out.wantedOpeningRatio).toBe(1);
    expect(l.shared.failSafe).toBe(true);
  });

  test("air compensation raises a hot day's target by the stated strength, within its limit", () => {
    // ideal gas: 60 K above 298.15 K is +20.1 % volume; 80 % of it is +16.1 %
    const low = { ...CALIBRATION, targetBoost: { ...CALIBRATION.targetBoost, values: [150, 150, 150, 150] } };
    const l = loop({ ...STRUCTURE, airCompensation: true }, low);
    expect(l.hold(50, { chargeTemperatureK: 358.15 }).boostWantedKpa).toBeCloseTo(
      150 * (1 + (0.8 * 60) / 298.15),
      6,
    );
    expect(l.hold(50, { chargeTemperatureK: 420 }).boostWantedKpa).toBeCloseTo(150 * 1.2, 6);
    expect(l.hold(50, { chargeTemperatureK: 260 }).boostWantedKpa).toBe(150);
  });

  test("after a trip the gate closes within its slew and the target starts from the boost there is", () => {
    const l = loop();
    l.hold(200, { boostPressureKpa: 235 });
    l.shared.tripped = true;
    l.shared.guardActive = true;
    const held = l.hold(100, { boostPressureKpa: 130 });
    expect(held.wantedOpeningRatio).toBe(1);
    l.shared.tripped = false;
    l.shared.guardActive = false;
    let previous = 1;
    const first = l.step({ boostPressureKpa: 130 });
    expect(first.boostTargetKpa).toBeLessThanOrEqual(130 + 2 * 900 * 0.005 + 1e-9);
    for (let k = 0; k < 50; k++) {
      const { wantedOpeningRatio } = l.step({ boostPressureKpa: 130 });
      expect(previous - wantedOpeningRatio).toBeLessThanOrEqual(5 * 0.005 + 1e-9);
      previous = wantedOpeningRatio;
    }
  });

  test("a target that hovers about the least boost does not change the mode back and forth", () => {
    const low = { ...CALIBRATION, targetBoost: { ...CALIBRATION.targetBoost, values: [105, 105, 105, 105] } };
    const l = loop(STRUCTURE, low);
    l.hold(50, { ambientPressureKpa: 99 });
    const modes = new Set(
      Array.from({ length: 200 }, (_, k) => l.step({ ambientPressureKpa: 100 + (k % 2 ? 0.4 : -0.4) }).mode),
    );
    expect(modes.size).toBe(1);
  });

  test("lost signals take the safe side in the guard: highest foot of the floor, accelerator taken as pressed", () => {
    const l = loop();
    l.hold(50);
    const base = l.shared.guardBase;
    l.hold(50, { engineSpeedRpm: Number.NaN, acceleratorRatio: Number.NaN });
    expect(l.shared.guardBase).toBeGreaterThan(base);
    expect(l.shared.guardBase).toBeCloseTo(450, 6);
    expect(l.shared.acceleratorRatio).toBe(1);
  });

  test("the guard never reduces the target below ambient", () => {
    const l = loop();
    l.hold(100);
    l.shared.targetReductionKpa = 400;
    expect(l.hold(400).boostTargetKpa).toBeCloseTo(100, 6);
  });

  test("the guard's reduction lowers the followed target, not the wanted one", () => {
    const l = loop();
    l.hold(100);
    l.shared.targetReductionKpa = 20;
    const out = l.hold(100);
    expect(out.boostWantedKpa).toBe(240);
    expect(out.boostTargetKpa).toBe(220);
  });
});
