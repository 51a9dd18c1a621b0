// Powers and exponentials from + - x / and square roots alone, so that every machine computes the same bits.
// error    against the platform's Math: naturalLog <= 4e-15 absolute (0.01 <= x <= 100), relative: exponential <= 2e-15
//          (|x| <= 20), powerOf <= 1e-14, standardPressure <= 1e-14 (-1000 m .. 11 km);
//          swept by test/hil-sim/exact-math.test.ts
// outside  naturalLog of x <= 0 is NaN; NaN in, NaN out

// ln 2 in two parts; the first has 20 trailing zero bits, so that a whole multiple of it is exact.
const LN_2_HIGH = 0.6931471803691238;
const LN_2_LOW = 1.9082149292705877e-10;

/** ln x: k ln 2 + 2 atanh((m - 1)/(m + 1)) with x = m 2^k, m from 0.7 to 1.4. */
export function naturalLog(x: number): number {
  if (!(x > 0)) return Number.NaN;
  if (x === Number.POSITIVE_INFINITY) return x;
  let mantissa = x;
  let doublings = 0;
  for (; mantissa > 1.4; mantissa *= 0.5) doublings += 1;
  for (; mantissa < 0.7; mantissa *= 2) doublings -= 1;
  const z = (mantissa - 1) / (mantissa + 1);
  const squared = z * z;
  let sum = 0;
  for (let order = 23; order >= 1; order -= 2) sum = sum * squared + 1 / order;
  return doublings * LN_2_HIGH + (doublings * LN_2_LOW + 2 * z * sum);
}

/** e^x: Taylor's series at r, then k doublings, with x = k ln 2 + r and |r| at most 0.35. */
export function exponential(x: number): number {
  if (x > 709) return Number.POSITIVE_INFINITY;
  if (x < -745) return 0;
  const doublings = Math.floor(x / LN_2_HIGH + 0.5);
  const rest = x - doublings * LN_2_HIGH - doublings * LN_2_LOW;
  let less = 0;
  for (let order = 15; order >= 1; order--) less = ((1 + less) * rest) / order;
  let result = 1 + less;
  for (let i = 0; i < doublings; i++) result *= 2;
  for (let i = 0; i > doublings; i--) result *= 0.5;
  return result;
}

/** base^exponent for a positive base. */
export function powerOf(base: number, exponent: number): number {
  return exponential(exponent * naturalLog(base));
}

/** Pressure Pa of the standard atmosphere at a geopotential altitude m up to 11 km (ISO 2533; constants of the closed form from memory). */
export function standardPressure(altitude: number): number {
  return 101325 * powerOf(1 - 2.25577e-5 * altitude, 5.2559);
}
