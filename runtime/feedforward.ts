import type { Calibration } from "./calibration.ts";
import { interpolateTable } from "./interpolate.ts";
import type { Structure } from "./structure.ts";
import type { Real } from "./types.ts";

/** What holds the target in steady state, in the feedback coordinate: table over the target and engine speed. */
export function feedforwardFor(
  structure: Structure,
  calibration: Calibration,
  targetKpa: Real,
  ambientKpa: Real,
  engineSpeedRpm: Real,
): Real {
  let term: Real = 0;
  if (structure.feedforward === "over_pressure_ratio") {
    term = interpolateTable(
      calibration.feedforward.rows,
      calibration.feedforward.columns,
      calibration.feedforward.values,
      targetKpa / ambientKpa,
      engineSpeedRpm,
    );
  }
  if (structure.feedforward === "over_target_pressure") {
    term = interpolateTable(
      calibration.feedforward.rows,
      calibration.feedforward.columns,
      calibration.feedforward.values,
      targetKpa,
      engineSpeedRpm,
    );
  }
  return term;
}
