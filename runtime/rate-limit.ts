import { clamp } from "./intrinsics.ts";
import type { Real } from "./types.ts";

/**
 * Follows `wanted` no faster than `risePerS` upwards and `fallPerS` downwards, and reaches it exactly.
 * A step may differ from rate * dt by one rounding of the sum. NaN in `wanted` falls.
 */
export function rateLimit(previous: Real, wanted: Real, risePerS: Real, fallPerS: Real, stepS: Real): Real {
  return clamp(wanted, previous - fallPerS * stepS, previous + risePerS * stepS);
}
