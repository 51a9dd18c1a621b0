// Gas properties, air and exhaust alike. The exponents that follow from them are 3.5 for air and 1/4 for
// exhaust, so every power in the plant is a product of square roots.
//   ratio of specific heats   air 7/5, exhaust 4/3
// source: ideal gas; R of dry air 287.05 J/(kg K) in the standard atmosphere, rounded here as handbooks do.

/** J/(kg·K). */
export const GAS_CONSTANT = 287;
/** J/(kg·K), 7/2 R. */
export const HEAT_CAPACITY_AIR = 1004.5;
/** J/(kg·K), 4 R. */
export const HEAT_CAPACITY_EXHAUST = 1148;

/** x to the power 7/2, by one square root. */
export function powerSevenHalves(x: number): number {
  return x * x * x * Math.sqrt(x);
}
