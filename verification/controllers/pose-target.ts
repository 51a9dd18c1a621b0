import type { PressureReference } from "../../spec/controller-spec.ts";

/** The calibration values by which a test poses a target: the same names in the runtime and in generated code. */
export interface TargetCalibration {
  readonly targetBoost: { readonly values: number[] | Float32Array | Float64Array };
  airAtMostRatio?: number;
  boostCeilingKpa: number;
  pressureRatioCeiling?: number;
}

/** kPa abs and ratio beyond any boost: ceilings out of the way, still inside the calibration's own limits. */
const NO_CEILING_KPA = 2000;
const NO_CEILING_RATIO = 1000;

/** A wanted boost in place of the target table, through the calibration. */
export interface PosedTarget {
  /** kPa abs; NaN: the table decides. */
  kilopascal: number;
  /** What the table was last written for. */
  writtenFor: number;
}

/** Forgets a posed target; the caller puts the calibration back as generated. */
export function clearPosedTarget(posed: PosedTarget): void {
  posed.kilopascal = Number.NaN;
  posed.writtenFor = Number.NaN;
}

/**
 * Writes the posed target into every cell of the table, in the table's own reference, and switches air compensation
 * off; does nothing when the table holds it already. Call before each slow step: a gauge or ratio target moves with the
 * ambient pressure measured.
 */
export function writePosedTarget(
  posed: PosedTarget,
  calibration: TargetCalibration,
  reference: PressureReference,
  ambientKpa: number,
  round: (value: number) => number,
): void {
  const cell = inReference(posed.kilopascal, reference, ambientKpa);
  if (Number.isNaN(cell) || cell === posed.writtenFor) return;
  posed.writtenFor = cell;
  calibration.targetBoost.values.fill(round(cell));
  if (calibration.airAtMostRatio !== undefined) calibration.airAtMostRatio = 0;
}

export function liftCeilings(calibration: TargetCalibration): void {
  calibration.boostCeilingKpa = NO_CEILING_KPA;
  if (calibration.pressureRatioCeiling !== undefined) calibration.pressureRatioCeiling = NO_CEILING_RATIO;
}

function inReference(kilopascal: number, reference: PressureReference, ambientKpa: number): number {
  if (reference === "gauge") return kilopascal - ambientKpa;
  return reference === "pressure_ratio" ? kilopascal / ambientKpa : kilopascal;
}
