import { describe, expect, test } from "vitest";
import { powerSevenHalves } from "../../../hil-sim/plant/gas.ts";
import {
  CHOKED_FLOW,
  CRITICAL_RATIO,
  flowFunction,
  LINEAR_ABOVE,
  orificeFlow,
} from "../../../hil-sim/plant/orifice.ts";

// Source: isentropic flow of a perfect gas, gamma 1.4: flow function over its choked value 0.684731, recomputed from
// the published nozzle equation; critical ratio 0.528282 (Aeronautical Engineer's Data Book, app. 4).
const ISENTROPIC = [
  [0.5, 0.684731],
  [0.6, 0.676915],
  [0.7, 0.638317],
  [0.8, 0.560661],
  [0.9, 0.422581],
] as const;

describe("the flow function", () => {
  test.each(ISENTROPIC)("at pressure ratio %d is the isentropic one within 0.6 %", (ratio, psi) => {
    expect(Math.abs(flowFunction(ratio) / (psi / 0.684731) - 1)).toBeLessThan(0.006);
  });

  test("stays within 0.6 % of the isentropic one all the way to the linear zone", () => {
    const isentropic = (r: number) => Math.sqrt(7 * (r ** (2 / 1.4) - r ** (2.4 / 1.4))) / 0.684731;
    for (let r = 0.5283; r < LINEAR_ABOVE; r += 1e-4) {
      expect(Math.abs(flowFunction(r) / isentropic(r) - 1)).toBeLessThan(0.006);
    }
  });

  test("is choked up to a critical ratio within 0.002 of the isentropic 0.5283", () => {
    expect(Math.abs(CRITICAL_RATIO - 0.528282)).toBeLessThan(0.002);
    expect(flowFunction(0)).toBe(1);
    expect(flowFunction(CRITICAL_RATIO)).toBe(1);
  });

  test("is continuous at both joints and 0 at equal pressures", () => {
    const below = (r: number) => flowFunction(r - 1e-9);
    expect(flowFunction(CRITICAL_RATIO + 1e-9)).toBeCloseTo(1, 8);
    expect(flowFunction(LINEAR_ABOVE)).toBeCloseTo(below(LINEAR_ABOVE), 7);
    expect(flowFunction(1)).toBe(0);
  });
});

describe("an orifice", () => {
  test("has the handbook's choked constant for air to 0.05 %", () => {
    // Source: sqrt(gamma/R) (2/(gamma+1))^3 for gamma 1.4, R 287: 0.0404184, recomputed.
    expect(Math.abs(CHOKED_FLOW / 0.0404184 - 1)).toBeLessThan(5e-4);
  });

  test("of 1 cm2 at 101325 Pa and 288.15 K chokes at 24.126 g/s", () => {
    // Source: worked number of the choked-flow equation for air, recomputed.
    expect(orificeFlow(1e-4, 101325, 20000, Math.sqrt(288.15)) * 1000).toBeCloseTo(24.126, 1);
  });

  test("flows backwards by as much as forwards when the pressures change places", () => {
    const forward = orificeFlow(2e-4, 180e3, 120e3, Math.sqrt(310));
    expect(forward).toBeGreaterThan(0);
    expect(orificeFlow(2e-4, 120e3, 180e3, Math.sqrt(310))).toBe(-forward);
  });

  test("without area or pressure difference does not flow", () => {
    expect(orificeFlow(0, 2e5, 1e5, 17)).toBe(0);
    expect(orificeFlow(1e-3, 1e5, 1e5, 17)).toBe(0);
  });
});

// Source: compressible flow tables, k = 1.4 (textbook appendix A.1; Aeronautical Engineer's Data Book, app. 4):
// T/T0 and p/p0 at a Mach number, four decimals.
test.each([
  [0.15, 0.9955, 0.9844],
  [0.5, 0.9524, 0.843],
  [0.6, 0.9328, 0.784],
  [0.82, 0.8815, 0.643],
  [0.9, 0.8606, 0.5913],
  [1, 0.8333, 0.5283],
])("the power 7/2 gives the tables' p/p0 at Mach %d", (mach, temperature, pressure) => {
  const ratio = 1 / (1 + 0.2 * mach * mach);
  expect(Math.abs(ratio - temperature)).toBeLessThan(1e-4);
  expect(Math.abs(powerSevenHalves(ratio) - pressure)).toBeLessThan(1e-4);
});
