import { clamp, max, min } from "./intrinsics.ts";
import type { Count, Real } from "./types.ts";

/** Interval of the axis that holds `x`: the last node not above it, within 0 .. length - 2. NaN gives 0. */
export function locate(axis: readonly Real[], x: Real): Count {
  let index: Count = 0;
  for (let i = 1; i < axis.length - 1; i++) {
    if (x >= axis[i]) {
      index = i;
    }
  }
  return index;
}

/**
 * How far `x` lies between two nodes, 0 .. 1; outside the axis the nearer end. NaN gives 0.
 * fraction = (x - low) / (high - low), with high > low an obligation on the calibration.
 */
export function fractionBetween(low: Real, high: Real, x: Real): Real {
  return clamp((x - low) / (high - low), 0, 1);
}

/**
 * Straight line between two values, never outside them: a + (b - a) t can pass b by one rounding, hence the clamp.
 */
export function blend(a: Real, b: Real, fraction: Real): Real {
  return clamp(a + (b - a) * fraction, min(a, b), max(a, b));
}

/** Piecewise linear value over one axis, held constant outside it. */
export function interpolateCurve(axis: readonly Real[], values: readonly Real[], x: Real): Real {
  const index = locate(axis, x);
  const fraction = fractionBetween(axis[index], axis[index + 1], x);
  return blend(values[index], values[index + 1], fraction);
}

/** Bilinear value over two axes, held constant outside them: along the columns first, then between the two rows. */
export function interpolateTable(
  rows: readonly Real[],
  columns: readonly Real[],
  values: readonly Real[],
  row: Real,
  column: Real,
): Real {
  const r = locate(rows, row);
  const c = locate(columns, column);
  const columnFraction = fractionBetween(columns[c], columns[c + 1], column);
  const first: Count = r * columns.length + c;
  const second: Count = first + columns.length;
  const low = blend(values[first], values[first + 1], columnFraction);
  const high = blend(values[second], values[second + 1], columnFraction);
  return blend(low, high, fractionBetween(rows[r], rows[r + 1], row));
}
