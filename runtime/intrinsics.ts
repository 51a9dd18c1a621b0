import type { Count, Flag, Real } from "./types.ts";

// The only operations beyond + - * / and comparison. Every target prints them with exactly these meanings:
// comparisons, never a library's min or max, since those differ on NaN and -0 between machines.

/** `b` when either is NaN or both are equal. */
export function min(a: Real, b: Real): Real {
  return a < b ? a : b;
}

/** `b` when either is NaN or both are equal. */
export function max(a: Real, b: Real): Real {
  return a > b ? a : b;
}

/** NaN gives `low`, so `low` must be the safe side. */
export function clamp(x: Real, low: Real, high: Real): Real {
  return x > high ? high : x >= low ? x : low;
}

export function abs(x: Real): Real {
  return Math.abs(x);
}

export function sqrt(x: Real): Real {
  return Math.sqrt(x);
}

export function isFinite(x: Real): Flag {
  return x - x === 0;
}

/** Neither is less than the other, both finite. */
export function same(a: Real, b: Real): Flag {
  return isFinite(a) && isFinite(b) && !(a < b) && !(a > b);
}

/** Truncates towards zero within literal bounds; NaN gives `low`. */
export function toCount(x: Real, low: Count, high: Count): Count {
  return x >= high ? high : x > low ? Math.trunc(x) : low;
}

export function toReal(count: Count): Real {
  return count;
}
