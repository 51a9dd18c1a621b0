import fc from "fast-check";
import { describe, expect, test } from "vitest";
import { type ParameterName, plantParameters } from "../../hil-sim/plant/plant-parameters.ts";
import { applyScatter, SCATTER_SETS, uniformScatter } from "../../hil-sim/scatter.ts";
import { engineA } from "./engines.ts";

const nominal = plantParameters(engineA);
const set = SCATTER_SETS.default;

describe("scatter", () => {
  test("of nothing changes nothing, and never touches the nominal plant", () => {
    const before = { ...nominal };
    expect(
      applyScatter(
        nominal,
        set,
        set.map(() => 0),
      ),
    ).toEqual(nominal);
    applyScatter(
      nominal,
      set,
      set.map(() => 1),
    );
    expect(nominal).toEqual(before);
  });

  test("multiplies each named parameter by one plus its share, and no other", () => {
    const draw = fc.double({ min: -1, max: 1, noNaN: true });
    fc.assert(
      fc.property(fc.array(draw, { minLength: set.length, maxLength: set.length }), (draws) => {
        const scattered = applyScatter(nominal, set, draws);
        const factors = new Map<ParameterName, number>(
          set.flatMap((entry, i) =>
            entry.parameters.map((name) => [name, 1 + entry.halfWidth * draws[i]] as const),
          ),
        );
        for (const [name, value] of Object.entries(nominal) as [ParameterName, number][]) {
          expect(scattered[name]).toBeCloseTo(value * (factors.get(name) ?? 1), 12);
        }
      }),
      { seed: 3, numRuns: 50 },
    );
  });

  test("of volumetric efficiency moves its three coefficients together", () => {
    const index = set.findIndex(({ name }) => name === "volumetricEfficiency");
    const scattered = applyScatter(
      nominal,
      set,
      set.map((_, i) => (i === index ? 1 : 0)),
    );
    expect(scattered.volumetricEfficiencyLinear / nominal.volumetricEfficiencyLinear).toBeCloseTo(1.05, 12);
    expect(scattered.volumetricEfficiencyBase / nominal.volumetricEfficiencyBase).toBeCloseTo(1.05, 12);
  });

  test("as one percentage keeps the quantities and replaces the widths", () => {
    expect(uniformScatter(0.02).map(({ name }) => name)).toEqual(set.map(({ name }) => name));
    expect(new Set(uniformScatter(0.02).map(({ halfWidth }) => halfWidth))).toEqual(new Set([0.02]));
  });

  test("with too few draws is refused", () => {
    expect(() => applyScatter(nominal, set, [0])).toThrow(/23 draws/);
  });
});
