// Source of the numbers: test/reference/plant/*.csv, an independent Python implementation integrated by scipy's
// LSODA at relative tolerance 1e-9; each run starts at its own equilibrium.
import { describe, expect, test } from "vitest";
import { openLoopCsv } from "../../../hil-sim/open-loop/open-loop-csv.ts";
import { readInputs } from "../../../hil-sim/open-loop/read-inputs.ts";
import { simulateOpenLoop } from "../../../hil-sim/open-loop/simulate-open-loop.ts";
import { plantParameters } from "../../../hil-sim/plant/plant-parameters.ts";
import { engineA, engineB } from "../engines.ts";
import { referenceTable, referenceText } from "../reference.ts";
import { rowsOf } from "../table.ts";

/** Largest error allowed per column, as a share of the value, or of the scale beside it where the value may be small. */
const ALLOWED: Record<string, { readonly share: number; readonly scale?: number }> = {
  boost_pressure_kpa: { share: 0.005 },
  manifold_pressure_kpa: { share: 0.005 },
  exhaust_pressure_kpa: { share: 0.005 },
  turbine_outlet_pressure_kpa: { share: 0.005 },
  turbo_speed_rpm: { share: 0.001 },
  compressor_flow_kg_s: { share: 0.005, scale: 0.3 },
  boost_temperature_k: { share: 0.001 },
  compressor_inlet_temperature_k: { share: 0.001 },
  exhaust_temperature_k: { share: 0.001 },
  exhaust_wall_temperature_k: { share: 0.001 },
  wastegate_opening_ratio: { share: 0.005, scale: 1 },
  bypass_opening_ratio: { share: 0.005, scale: 1 },
  throttle_opening_ratio: { share: 0.005, scale: 1 },
  engine_speed_rpm: { share: 1e-6 },
};

describe.each([
  ["tip-in-a", engineA],
  ["lift-off-hold-a", engineA],
  ["speed-ramp-a", engineA],
  ["tip-in-b", engineB],
])("%s", (name, spec) => {
  const wanted = referenceTable(`${name}.csv`);
  const inputs = readInputs(referenceText(`${name}.csv`));
  if (inputs.rows === undefined) throw new Error(JSON.stringify(inputs.problems));
  const result = simulateOpenLoop(plantParameters(spec), inputs.rows);
  const found = rowsOf(openLoopCsv(result.rows));

  test("has one row per row of the reference, the same columns in the same order", () => {
    expect(found.length).toBe(wanted.length);
    expect(Object.keys(found[0])).toEqual(Object.keys(wanted[0]));
    expect(found.map((row) => row.time_s)).toEqual(wanted.map((row) => row.time_s));
  });

  test.each(Object.keys(ALLOWED))("%s agrees at every row", (column) => {
    const { share, scale } = ALLOWED[column];
    let worst = { error: -1, time: 0 };
    for (const [k, row] of wanted.entries()) {
      const error = Math.abs(found[k][column] - row[column]) / (scale ?? Math.abs(row[column]));
      if (!(error <= worst.error)) worst = { error, time: row.time_s };
    }
    expect(worst.error, `at ${worst.time} s`).toBeLessThanOrEqual(share);
  });

  test("needs no bound and starts steady", () => {
    expect(result.startedSteady).toBe(true);
    expect(result.clamps).toBe(0);
  });
});
