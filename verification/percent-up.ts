/** A probability as the digits of a percentage, two significant ones, rounded up: a bound is never understated. */
export function percentUp(probability: number): string {
  const percent = probability * 100;
  if (percent <= 0) return "0";
  const unit = 10 ** (Math.floor(Math.log10(percent)) - 1);
  const up = Math.ceil(percent / unit - 1e-9) * unit;
  return up >= 99.5 ? "100" : plainDecimals(up, unit);
}

/** As many decimals as the unit has: two significant digits, the trailing zero kept. */
function plainDecimals(value: number, unit: number): string {
  return value.toFixed(Math.max(0, Math.round(-Math.log10(unit))));
}
