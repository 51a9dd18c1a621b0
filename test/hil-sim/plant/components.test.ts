// Laws of single components, over random operating points.
import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { inletPressure, mixedInletTemperature } from "../../../hil-sim/plant/air-filter.ts";
import { chokeFlow, mapFlow, peakFlow, usableHead, workVelocity } from "../../../hil-sim/plant/compressor.ts";
import { engineAirFlow, portTemperature } from "../../../hil-sim/plant/engine.ts";
import { powerSevenHalves } from "../../../hil-sim/plant/gas.ts";
import { compressorOutletPressure, cooledTemperature } from "../../../hil-sim/plant/intercooler.ts";
import { orificeFlow } from "../../../hil-sim/plant/orifice.ts";
import { plantParameters } from "../../../hil-sim/plant/plant-parameters.ts";
import { throttleFlowArea } from "../../../hil-sim/plant/throttle.ts";
import { isentropicVelocity, turbineFlow, turbineTorque } from "../../../hil-sim/plant/turbine.ts";
import { wastegateArea } from "../../../hil-sim/plant/wastegate.ts";
import { engineA } from "../engines.ts";

const a = plantParameters(engineA);
const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const holds = (property: fc.IPropertyWithHooks<[number, number, number]>) =>
  fc.assert(property, { seed: 11, numRuns: 300 });

/** Map flow at a speed ratio, reference inlet, coming from a flow. */
function flowAt(speedRatio: number, pressureRatio: number, flowNow: number): number {
  const tip = speedRatio * 500;
  return mapFlow(a, usableHead(a, tip, speedRatio, 298), speedRatio, pressureRatio, flowNow);
}

/** Pressure ratios of a speed line: top and zero flow, by the powers written out. */
function lineAt(speedRatio: number) {
  const head = usableHead(a, speedRatio * 500, speedRatio, 298);
  return { top: (1 + 0.62 * head) ** 3.5, shutoff: (1 + 0.42 * head) ** 3.5 };
}

describe("the compressor map", () => {
  test("gives the choke flow at and below the choke pressure ratio, the peak flow at the top", () => {
    for (const speed of [0.3, 0.6, 0.9, 1.1]) {
      expect(flowAt(speed, 0.3 + 0.85 * speed * speed, 1)).toBeCloseTo(chokeFlow(a, speed), 12);
      expect(flowAt(speed, 0.1, 1)).toBeCloseTo(chokeFlow(a, speed), 12);
      // The tangent line meets the top a little inside: q = qL - (sL/qL)(1 - sL), qL = sqrt(1 - 0.98^2).
      const left = Math.sqrt(1 - 0.98 ** 2);
      const q = left - (0.98 / left) * 0.02;
      const width = chokeFlow(a, speed) - peakFlow(a, speed);
      expect(flowAt(speed, lineAt(speed).top, 1)).toBeCloseTo(peakFlow(a, speed) + width * q, 9);
    }
  });

  test("passes less the higher the pressure ratio, from forward flow", () => {
    holds(
      fc.property(between(0.2, 1.1), between(0.5, 4), between(0.001, 0.5), (speed, ratio, more) => {
        expect(flowAt(speed, ratio + more, 1)).toBeLessThanOrEqual(flowAt(speed, ratio, 1));
      }),
    );
  });

  test("never leaves the band from reverse to choke flow", () => {
    holds(
      fc.property(between(0, 1.2), between(0.3, 6), between(-0.2, 0.6), (speed, ratio, now) => {
        const choke = chokeFlow(a, speed);
        const flow = flowAt(speed, ratio, now);
        expect(flow).toBeGreaterThanOrEqual(-0.35 * choke - 1e-12);
        expect(flow).toBeLessThanOrEqual(choke + 1e-12);
      }),
    );
  });

  test("surges only above its zero-flow ratio and from small flow", () => {
    const { top, shutoff } = lineAt(0.9);
    const middle = (top + shutoff) / 2;
    expect(flowAt(0.9, middle, 0)).toBeLessThan(0);
    expect(flowAt(0.9, middle, 0.2)).toBeGreaterThan(0);
    expect(flowAt(0.9, 0.99 * shutoff, 0)).toBeGreaterThan(0);
  });

  test("at standstill is a plain restriction", () => {
    expect(peakFlow(a, 0)).toBe(0);
    expect(flowAt(0, 0.9, 0)).toBeGreaterThan(0);
    expect(workVelocity(a, 0, 0, 500)).toBe(0);
  });
});

describe("the turbine", () => {
  test("has the published parabola of efficiency over blade-speed ratio", () => {
    // eta = eta_m (2 B/beta - (B/beta)^2), power = flow · cp T (1 - PR^(1/4)) · eta
    holds(
      fc.property(
        between(0.3, 0.92),
        between(900, 1300),
        between(1000, 17000),
        (ratio, temperature, speed) => {
          const flow = turbineFlow(a, 2e5, ratio, Math.sqrt(temperature));
          const velocity = isentropicVelocity(ratio, temperature);
          const blade = (0.028 * speed) / velocity;
          const efficiency = 0.78 * (2 * (blade / 0.65) - (blade / 0.65) ** 2);
          const power = flow * 1148 * temperature * (1 - ratio ** 0.25) * efficiency;
          expect(turbineTorque(a, 0.78, flow, velocity, speed) * speed).toBeCloseTo(power, 6);
        },
      ),
    );
  });

  test("passes nothing at equal pressures, backwards when they are reversed, and gives no torque then", () => {
    expect(turbineFlow(a, 1e5, 1, 30)).toBe(0);
    expect(turbineFlow(a, 1e5, 1.05, 30)).toBeLessThan(0);
    expect(turbineTorque(a, 0.78, -0.1, 0, 5000)).toBe(0);
    // the factor stops at -0.5: 3.4e-5 · 1e5 · -0.5 / 30
    expect(turbineFlow(a, 1e5, 2, 30)).toBeCloseTo(-0.0566667, 6);
  });

  test("brakes above twice the best blade-speed ratio", () => {
    const velocity = isentropicVelocity(0.8, 1100);
    const speed = (2.1 * 0.65 * velocity) / 0.028;
    expect(turbineTorque(a, 0.78, 0.1, velocity, speed)).toBeLessThan(0);
  });
});

describe("flows and areas", () => {
  test("an orifice never passes less for a larger difference, nor the same unless choked backwards", () => {
    holds(
      fc.property(between(1e4, 4e5), between(1e4, 4e5), between(1, 1e5), (from, to, more) => {
        const before = orificeFlow(1e-4, from, to, 17);
        const after = orificeFlow(1e-4, from + more, to, 17);
        if ((from + more) / to <= 0.53) expect(after).toBe(before);
        else expect(after).toBeGreaterThan(before);
      }),
    );
  });

  test("gate and throttle areas rise with opening", () => {
    for (let x = 0; x < 1; x += 0.01) {
      expect(wastegateArea(a, x + 0.01)).toBeGreaterThan(wastegateArea(a, x));
      expect(throttleFlowArea(a, x + 0.01)).toBeGreaterThan(throttleFlowArea(a, x));
    }
    // 2.2e-5 + 2.6e-3
    expect(throttleFlowArea(a, 1)).toBeCloseTo(2.622e-3, 12);
  });

  test("the engine breathes less against back-pressure and stops at none", () => {
    expect(engineAirFlow(a, 400, 1e5, 2e5, 310)).toBeLessThan(engineAirFlow(a, 400, 1e5, 1e5, 310));
    expect(engineAirFlow(a, 400, 1e4, 5e5, 310)).toBe(0);
    expect(engineAirFlow(a, 0, 1e5, 1e5, 310)).toBe(0);
  });

  test("the air filter has no loss at rest and never takes more than half of ambient", () => {
    expect(inletPressure(8.7e6, 0, 1e5, 298)).toBe(1e5);
    expect(inletPressure(8.7e6, 3, 1e5, 298)).toBe(5e4);
    // 1e5 - 8.7e6 · 0.3 · 0.3 · 298 / 1e5
    expect(inletPressure(8.7e6, 0.3, 1e5, 298)).toBeCloseTo(97666.66, 2);
  });
});

describe("temperatures", () => {
  test("mixed inlet air lies between ambient and boost air, at ambient with the bypass shut", () => {
    expect(mixedInletTemperature(a, 0.2, 0, 298, 340)).toBe(298);
    // (0.102 · 298 + 0.1 · 340)/0.202
    expect(mixedInletTemperature(a, 0.1, 0.1, 298, 340)).toBeCloseTo(318.7921, 4);
  });

  test("the intercooler keeps between 14 and 70 % of the rise", () => {
    // eps = 0.86 - 0.45 · 0.2 = 0.77: 400 - 0.77 · (400 - 298 - 4)
    expect(cooledTemperature(a, 0.2, 400, 298)).toBeCloseTo(324.54, 9);
    expect(cooledTemperature(a, 3, 400, 298)).toBeCloseTo(400 - 0.3 * 98, 9);
    // 2e5 + 5e7 · 0.04 · 320 / 2e5
    expect(compressorOutletPressure(a, 0.2, 2e5, 320)).toBeCloseTo(203200, 6);
    expect(compressorOutletPressure(a, -0.2, 2e5, 320)).toBeCloseTo(196800, 6);
  });

  test("the port is hot when fired and 170 K above the intake when motored", () => {
    // 980 + 300 · 0.06/0.12
    expect(portTemperature(a, 1, 0.06, 310)).toBe(1130);
    expect(portTemperature(a, 0, 0.06, 310)).toBe(480);
  });
});

test("the power 7/2 by roots is the platform's power", () => {
  for (let x = 0.1; x < 3; x += 0.01) expect(powerSevenHalves(x) / x ** 3.5).toBeCloseTo(1, 13);
});
