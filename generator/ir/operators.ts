/** Kinds of value that an operator takes or gives; `enum` is any one enumeration. */
export type ValueKind = "real" | "count" | "flag" | "enum";

interface Operator {
  readonly takes: readonly ValueKind[];
  readonly gives: ValueKind;
  /** The exact meaning every target keeps to. `round` rounds once to the target's precision, to nearest even. */
  readonly means: string;
}

/**
 * The language: every operation a generated controller can perform. A target is a total table over these names.
 * NaN's payload and sign are outside the contract. `and`, `or` and `select` may or may not evaluate what they do not
 * need, since operands have no effects.
 */
export const OPERATORS = {
  add: { takes: ["real", "real"], gives: "real", means: "round(a + b)" },
  subtract: { takes: ["real", "real"], gives: "real", means: "round(a - b)" },
  multiply: { takes: ["real", "real"], gives: "real", means: "round(a * b)" },
  divide: { takes: ["real", "real"], gives: "real", means: "round(a / b)" },
  negate: { takes: ["real"], gives: "real", means: "the sign turned, exact" },
  absolute: { takes: ["real"], gives: "real", means: "the sign cleared, exact" },
  squareRoot: { takes: ["real"], gives: "real", means: "round(the square root); NaN below zero; -0 for -0" },
  minimum: {
    takes: ["real", "real"],
    gives: "real",
    means: "a < b ? a : b; so b when equal or either is NaN",
  },
  maximum: {
    takes: ["real", "real"],
    gives: "real",
    means: "a > b ? a : b; so b when equal or either is NaN",
  },
  clamp: {
    takes: ["real", "real", "real"],
    gives: "real",
    means: "x > high ? high : x >= low ? x : low; NaN gives low",
  },
  less: { takes: ["real", "real"], gives: "flag", means: "a < b; false when either is NaN" },
  lessEqual: { takes: ["real", "real"], gives: "flag", means: "a <= b; false when either is NaN" },
  greater: { takes: ["real", "real"], gives: "flag", means: "a > b; false when either is NaN" },
  greaterEqual: { takes: ["real", "real"], gives: "flag", means: "a >= b; false when either is NaN" },
  same: { takes: ["real", "real"], gives: "flag", means: "both finite and neither less than the other" },
  isFinite: { takes: ["real"], gives: "flag", means: "neither NaN nor infinite" },
  toCount: {
    takes: ["real", "count", "count"],
    gives: "count",
    means: "x >= high ? high : x > low ? truncate(x) : low; literal bounds within +-2^24; NaN gives low",
  },
  toReal: { takes: ["count"], gives: "real", means: "round(a)" },

  addCount: { takes: ["count", "count"], gives: "count", means: "a + b in 32 bits; must not overflow" },
  subtractCount: { takes: ["count", "count"], gives: "count", means: "a - b in 32 bits; must not overflow" },
  multiplyCount: { takes: ["count", "count"], gives: "count", means: "a * b in 32 bits; must not overflow" },
  negateCount: { takes: ["count"], gives: "count", means: "-a in 32 bits; must not overflow" },
  lessCount: { takes: ["count", "count"], gives: "flag", means: "a < b" },
  lessEqualCount: { takes: ["count", "count"], gives: "flag", means: "a <= b" },
  greaterCount: { takes: ["count", "count"], gives: "flag", means: "a > b" },
  greaterEqualCount: { takes: ["count", "count"], gives: "flag", means: "a >= b" },
  equalCount: { takes: ["count", "count"], gives: "flag", means: "a = b" },
  notEqualCount: { takes: ["count", "count"], gives: "flag", means: "a /= b" },

  and: { takes: ["flag", "flag"], gives: "flag", means: "both" },
  or: { takes: ["flag", "flag"], gives: "flag", means: "either or both" },
  not: { takes: ["flag"], gives: "flag", means: "the opposite; of a comparison with NaN too" },
  equalFlag: { takes: ["flag", "flag"], gives: "flag", means: "both or none" },
  notEqualFlag: { takes: ["flag", "flag"], gives: "flag", means: "one of the two" },
  equalEnum: { takes: ["enum", "enum"], gives: "flag", means: "the same member" },
  notEqualEnum: { takes: ["enum", "enum"], gives: "flag", means: "different members" },

  selectReal: { takes: ["flag", "real", "real"], gives: "real", means: "c ? a : b" },
  selectCount: { takes: ["flag", "count", "count"], gives: "count", means: "c ? a : b" },
  selectFlag: { takes: ["flag", "flag", "flag"], gives: "flag", means: "c ? a : b" },
  selectEnum: { takes: ["flag", "enum", "enum"], gives: "enum", means: "c ? a : b" },
} as const satisfies Record<string, Operator>;

export type OperatorName = keyof typeof OPERATORS;

export const OPERATOR_NAMES = Object.keys(OPERATORS) as readonly OperatorName[];
