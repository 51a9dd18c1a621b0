/** An exact number: `numerator / denominator`, denominator positive, lowest terms. */
export interface Rational {
  readonly numerator: bigint;
  readonly denominator: bigint;
}

const magnitude = (n: bigint): bigint => (n < 0n ? -n : n);

function greatestCommonDivisor(a: bigint, b: bigint): bigint {
  let [x, y] = [magnitude(a), magnitude(b)];
  while (y !== 0n) [x, y] = [y, x % y];
  return x;
}

export function rational(numerator: bigint, denominator = 1n): Rational {
  const sign = denominator < 0n ? -1n : 1n;
  const divisor = greatestCommonDivisor(numerator, denominator) * sign;
  return { numerator: numerator / divisor, denominator: denominator / divisor };
}

export const ONE = rational(1n);

export const multiply = (a: Rational, b: Rational): Rational =>
  rational(a.numerator * b.numerator, a.denominator * b.denominator);

export const divide = (a: Rational, b: Rational): Rational =>
  rational(a.numerator * b.denominator, a.denominator * b.numerator);

export const add = (a: Rational, b: Rational): Rational =>
  rational(a.numerator * b.denominator + b.numerator * a.denominator, a.denominator * b.denominator);

/** Whole power; negative exponents invert. */
export function power(base: Rational, exponent: number): Rational {
  const size = BigInt(Math.abs(exponent));
  const raised = rational(base.numerator ** size, base.denominator ** size);
  return exponent < 0 ? divide(ONE, raised) : raised;
}

const DECIMAL = /^([+-]?)(\d*)(?:\.(\d*))?(?:[eE]([+-]?\d+))?$/;

/** The exact value of a decimal text such as `-2.4e-3`; the text must already be a checked decimal. */
export function decimal(text: string): Rational {
  const [, sign = "", whole = "", fraction = "", exponent = "0"] = DECIMAL.exec(text) ?? [];
  const digits = BigInt(`${whole}${fraction}` || "0");
  const shift = Number(exponent) - fraction.length;
  const scale = 10n ** BigInt(Math.abs(shift));
  const signed = sign === "-" ? -digits : digits;
  return shift < 0 ? rational(signed, scale) : rational(signed * scale);
}

function integerRoot(n: bigint): bigint {
  if (n < 2n) return n;
  let guess = 1n << BigInt((n.toString(2).length + 1) >> 1);
  for (;;) {
    const next = (guess + n / guess) >> 1n;
    if (next >= guess) return guess;
    guess = next;
  }
}

const ROOT_BITS = 256n;

/** Square root: exact for squares of rationals, else to more than 200 bits; `x` at least 0. */
export function squareRoot(x: Rational): Rational {
  const [top, bottom] = [integerRoot(x.numerator), integerRoot(x.denominator)];
  if (top * top === x.numerator && bottom * bottom === x.denominator) return rational(top, bottom);
  const scaled = integerRoot((x.numerator << (2n * ROOT_BITS)) / x.denominator);
  return rational(scaled, 1n << ROOT_BITS);
}

const bitLength = (n: bigint): number => (n === 0n ? 0 : n.toString(2).length);

/** No double has a bit finer than the smallest subnormal, 2^-1074. */
const FINEST = -1074;
const MANTISSA_BITS = 53;

const scaled = (n: bigint, powerOfTwo: number): bigint => (powerOfTwo > 0 ? n << BigInt(powerOfTwo) : n);

/** Largest e with 2^e <= top / bottom. */
function binaryExponent(top: bigint, bottom: bigint): number {
  const guess = bitLength(top) - bitLength(bottom);
  return scaled(top, -guess) >= scaled(bottom, guess) ? guess : guess - 1;
}

/** The double nearest `x`, ties to even, subnormals included; overflows to an infinity. */
export function nearestDouble(x: Rational): number {
  if (x.numerator === 0n) return 0;
  const top = magnitude(x.numerator);
  const lastBit = Math.max(binaryExponent(top, x.denominator) - MANTISSA_BITS + 1, FINEST);
  const size = scaleByPowerOfTwo(
    roundedQuotient(scaled(top, -lastBit), scaled(x.denominator, lastBit)),
    lastBit,
  );
  return x.numerator < 0n ? -size : size;
}

/** Nearest whole number, ties to even; at most 2^53 here, so exact as a double. */
function roundedQuotient(top: bigint, bottom: bigint): number {
  const quotient = top / bottom;
  const twice = (top - quotient * bottom) * 2n;
  const up = twice > bottom || (twice === bottom && (quotient & 1n) === 1n);
  return Number(up ? quotient + 1n : quotient);
}

/** Exact: the factor is split so that no half of it leaves the range of doubles. */
function scaleByPowerOfTwo(value: number, exponent: number): number {
  const half = Math.trunc(exponent / 2);
  return value * 2 ** half * 2 ** (exponent - half);
}
