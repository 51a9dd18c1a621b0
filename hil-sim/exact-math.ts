// Powers and exponentials from + - x / and square roots alone, so that every machine computes the same bits.
// error    relative, against the platform's Math: naturalLog <= 4e-15 (absolute, 0.01 <= x <= 100),
//          exponential <= 2e-15 (|x| <= 20), powerOf <= 1e-14, standardPressure <= 1e-14 (-1000 m .. 11 km);
//          swept by test/hil-sim/exact-math.test.ts
// outside  naturalLog of x <= 0 is NaN; NaN in, NaN out

/** ln x: 2 atanh((y - 1)/(y + 1)) with y the eighth root of x, times 8. */
export function naturalLog(x: number): number {
  const root = Math.sqrt(Math.sqrt(Math.sqrt(x)));
  const z = (root - 1) / (root + 1);
  const squared = z * z;
  let sum = 0;
  for (let order = 23; order >= 1; order -= 2) sum = sum * squared + 1 / order;
  return 16 * z * sum;
}

/** e^x: Taylor's series at x/2^k, squared k times. */
export function exponential(x: number): number {
  let halvings = 0;
  let y = x;
  while (y > 0.03125 || y < -0.03125) {
    y *= 0.5;
    halvings += 1;
  }
  // Squaring e^y - 1 instead of e^y keeps the error from doubling with every pass.
  let less = 0;
  for (let order = 9; order >= 1; order--) less = ((1 + less) * y) / order;
  for (let i = 0; i < halvings; i++) less = less * (2 + less);
  return 1 + less;
}

/** base^exponent for a positive base. */
export function powerOf(base: number, exponent: number): number {
  return exponential(exponent * naturalLog(base));
}

/** Pressure Pa of the standard atmosphere at a geopotential altitude m up to 11 km (ISO 2533; constants of the closed form from memory). */
export function standardPressure(altitude: number): number {
  return 101325 * powerOf(1 - 2.25577e-5 * altitude, 5.2559);
}
