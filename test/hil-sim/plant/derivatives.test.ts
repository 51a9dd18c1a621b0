// Source of the numbers: test/reference/plant/derivatives-*.json, 150 random states per engine from an
// independent Python implementation of the published equations.
import { readFileSync } from "node:fs";
import { describe, expect, test } from "vitest";
import { derivatives } from "../../../hil-sim/plant/derivatives.ts";
import { newPlantFlows } from "../../../hil-sim/plant/plant-flows.ts";
import { newPlantFaults, newPlantInput } from "../../../hil-sim/plant/plant-input.ts";
import { plantParameters } from "../../../hil-sim/plant/plant-parameters.ts";
import { newPlantState } from "../../../hil-sim/plant/plant-state.ts";
import { engineA, engineB } from "../engines.ts";
import { inputFromSymbols, STATE_SYMBOLS, stateFromSymbols } from "../symbols.ts";

interface Case {
  readonly y: Record<string, number>;
  readonly u: Record<string, number>;
  readonly dydt: Record<string, number>;
}

describe.each([
  ["a", engineA],
  ["b", engineB],
])("engine %s", (letter, spec) => {
  const cases = JSON.parse(
    readFileSync(new URL(`../../reference/plant/derivatives-${letter}.json`, import.meta.url), "utf8"),
  ) as Case[];
  const parameters = plantParameters(spec);

  test("has the independent implementation's rates at every state to 1e-9", () => {
    expect(cases.length).toBeGreaterThanOrEqual(150);
    let worst = { error: 0, state: -1, symbol: "" };
    for (const [index, { y, u, dydt }] of cases.entries()) {
      const rates = newPlantState();
      derivatives(
        parameters,
        stateFromSymbols(y),
        inputFromSymbols(u),
        newPlantFaults(),
        newPlantFlows(),
        rates,
      );
      for (const [symbol, name] of Object.entries(STATE_SYMBOLS)) {
        const error = Math.abs(rates[name] - dydt[symbol]) / Math.max(Math.abs(dydt[symbol]), 1e-6);
        if (!(error <= worst.error)) worst = { error, state: index, symbol };
      }
    }
    expect(worst.error, `state ${worst.state}, d${worst.symbol}/dt`).toBeLessThan(1e-9);
  });
});

test("a fresh input is open, fuelled and at sea level", () => {
  expect(newPlantInput().fuel).toBe(1);
});
