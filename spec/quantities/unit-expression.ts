// Text of a unit to its dimension and factor, by a small grammar:
//   expression = term { ("*" | "/") term }
//   term       = ( name | "1" | "(" expression ")" ) [ "^" ] [ power ]
//   power      = whole number, or a multiple of a half after "^": m2, K^0.5, s^-1
import { NAMED_UNITS, type NamedUnit } from "../units.ts";
import { divide, multiply, ONE, power, type Rational, squareRoot } from "./rational.ts";

/** A unit in any form. Powers are doubled and the factor squared, so that half powers stay exact. */
export interface Unit {
  readonly text: string;
  readonly doubledPowers: readonly [kg: number, m: number, s: number, K: number];
  readonly squaredFactor: Rational;
  /** Doubled power of revolutions: each brings a factor 2 pi over the radian. */
  readonly doubledTurns: number;
  /** Says rpm, krpm, Hz or rad somewhere. */
  readonly angular: boolean;
  /** Only for a temperature scale standing alone. */
  readonly scale?: { readonly offset: Rational; readonly factor: Rational };
}

export interface UnitFailure {
  readonly reason: "unknown" | "malformed" | "scale_in_compound";
  /** The part of the text that is at fault. */
  readonly part: string;
}

export type UnitResult =
  | { readonly ok: true; readonly unit: Unit }
  | { readonly ok: false; readonly failure: UnitFailure };

type Parsed = Omit<Unit, "text">;

class Refusal extends Error {
  readonly failure: UnitFailure;
  constructor(reason: UnitFailure["reason"], part: string) {
    super(part);
    this.failure = { reason, part };
  }
}

const BY_NAME: ReadonlyMap<string, NamedUnit> = new Map(NAMED_UNITS.map((each) => [each.name, each]));
const TOKEN = /\s*([A-Za-z]+|%|\^[+-]?\d+(?:\.5|\.0)?|\d+|[*/()])/y;
const DIMENSIONLESS: Parsed = {
  doubledPowers: [0, 0, 0, 0],
  squaredFactor: ONE,
  doubledTurns: 0,
  angular: false,
};
/** Far beyond any unit in use; keeps hostile powers from growing numbers without end. */
const LARGEST_POWER = 6;
const LONGEST_TEXT = 80;

function tokens(text: string): string[] {
  const found: string[] = [];
  TOKEN.lastIndex = 0;
  while (TOKEN.lastIndex < text.length) {
    const start = TOKEN.lastIndex;
    const match = TOKEN.exec(text);
    if (match === null) throw new Refusal("malformed", text.slice(start).trim());
    found.push(match[1]);
  }
  return found;
}

function combine(a: Parsed, b: Parsed, sign: 1 | -1): Parsed {
  const join = (x: number, y: number): number => x + sign * y;
  return {
    doubledPowers: [0, 1, 2, 3].map((i) => join(a.doubledPowers[i], b.doubledPowers[i])) as [
      number,
      number,
      number,
      number,
    ],
    squaredFactor: (sign === 1 ? multiply : divide)(a.squaredFactor, b.squaredFactor),
    doubledTurns: join(a.doubledTurns, b.doubledTurns),
    angular: a.angular || b.angular,
  };
}

function raise(base: Parsed, doubled: number, part: string): Parsed {
  const half = doubled / 2;
  const doubledPowers = base.doubledPowers.map((each) => each * half);
  const doubledTurns = base.doubledTurns * half;
  if (Math.abs(half) > LARGEST_POWER || ![...doubledPowers, doubledTurns].every(Number.isInteger))
    throw new Refusal("malformed", part);
  return {
    doubledPowers: doubledPowers as [number, number, number, number],
    squaredFactor: power(squareRoot(base.squaredFactor), doubled),
    doubledTurns,
    angular: base.angular,
  };
}

function named(name: string, alone: boolean): Parsed {
  const found = BY_NAME.get(name);
  if (found === undefined) throw new Refusal("unknown", name);
  if (found.offset !== undefined && !alone) throw new Refusal("scale_in_compound", name);
  const counts = found.countsTurns === true;
  return {
    doubledPowers: found.powers.map((each) => each * 2) as [number, number, number, number],
    squaredFactor: multiply(found.factor, found.factor),
    doubledTurns: counts ? 2 : 0,
    angular: counts || found.countsRadians === true,
    ...(found.offset === undefined ? {} : { scale: { offset: found.offset, factor: found.factor } }),
  };
}

const POWER = /^\^?[+-]?\d+(\.[05])?$/;

function parse(all: readonly string[], text: string): Parsed {
  let at = 0;
  const fail = (): never => {
    throw new Refusal("malformed", all[at] ?? text);
  };
  const atom = (): Parsed => {
    const token = all[at];
    if (token === undefined) return fail();
    at += 1;
    if (token === "1") return DIMENSIONLESS;
    if (/^[A-Za-z%]/.test(token)) return named(token, all.length === 1);
    if (token !== "(") return fail();
    const inner = expression();
    if (all[at] !== ")") return fail();
    at += 1;
    return inner;
  };
  const term = (): Parsed => {
    const start = at;
    const base = atom();
    const next = all[at];
    if (all[start] === "1" || next === undefined || !POWER.test(next)) return base;
    at += 1;
    return raise(base, Number(next.replace("^", "")) * 2, `${all[start]}${next}`);
  };
  const expression = (): Parsed => {
    let value = term();
    while (all[at] === "*" || all[at] === "/") {
      const sign = all[at] === "*" ? 1 : -1;
      at += 1;
      value = combine(value, term(), sign);
    }
    return value;
  };
  const whole = expression();
  return at === all.length ? whole : fail();
}

/** Reads a unit such as `mm2*s` or `kg*K^0.5/(s*Pa)`; the empty text is the dimensionless unit. Never throws. */
export function readUnit(text: string): UnitResult {
  const tidy = text.trim();
  if (tidy === "") return { ok: true, unit: { text: "", ...DIMENSIONLESS } };
  if (tidy.length > LONGEST_TEXT) return { ok: false, failure: { reason: "malformed", part: tidy } };
  try {
    return { ok: true, unit: { text: tidy, ...parse(tokens(tidy), tidy) } };
  } catch (problem) {
    if (problem instanceof Refusal) return { ok: false, failure: problem.failure };
    throw problem;
  }
}

/** A unit of our own tables; a mistake there is our fault and throws. */
export function knownUnit(text: string): Unit {
  const result = readUnit(text);
  if (!result.ok) throw new Error(`unit table: "${text}" is not a unit`);
  return result.unit;
}
