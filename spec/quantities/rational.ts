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

/** Smallest subnormal is 2^-1074: no double has a finer last bit. */
const FINEST = 1074;

/** The double nearest `x`, ties to even, subnormals included; overflows to an infinity. */
export function nearestDouble(x: Rational): number {
  if (x.numerator === 0n) return 0;
  const top = magnitude(x.numerator);
  const wanted = 64 - (bitLength(top) - bitLength(x.denominator));
  const shift = Math.min(wanted, FINEST);
  const scaledTop = shift > 0 ? top << BigInt(shift) : top;
  const scaledBottom = shift < 0 ? x.denominator << BigInt(-shift) : x.denominator;
  const quotient = scaledTop / scaledBottom;
  const exact = quotient * scaledBottom === scaledTop;
  const size = wanted > FINEST ? roundWhole(scaledTop, scaledBottom) : roundSticky(quotient, exact);
  const value = scaleByPowerOfTwo(size, -shift);
  return x.numerator < 0n ? -value : value;
}

/** `Number` of a BigInt rounds to nearest, ties to even; the sticky bit stands for the remainder. */
const roundSticky = (quotient: bigint, exact: boolean): number => Number(exact ? quotient : quotient | 1n);

/** Near the subnormals the last bit of the quotient is the last bit of the double: round to it. */
function roundWhole(top: bigint, bottom: bigint): number {
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
