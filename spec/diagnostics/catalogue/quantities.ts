import type { Explanation } from "../explanation.ts";

/** Numbers and units. */
export const QUANTITY_CODES = {
  "not-a-number": {
    severity: "error",
    cause: "Text stands where a number belongs.",
    example: "step: fast",
    fix: "Write a number with its unit, for example `step: 5 ms`.",
  },
  "not-finite": {
    severity: "error",
    cause: "The value is infinite, not a number, or too large for any quantity of the language.",
    example: "ceiling: .inf kPa abs",
    fix: "Write a finite number. A limit that never acts is written as a large value that makes sense.",
  },
  "number-format": {
    severity: "error",
    cause: "The number has grouped digits or a decimal comma. What is meant depends on the country.",
    example: "limit: 165,000 rpm",
    fix: "Write digits without grouping and a point for decimals: `165000 rpm`.",
  },
  "missing-unit": {
    severity: "error",
    cause: "The quantity has a dimension, so its number needs a unit. Only ratios may be bare.",
    example: "step: 5",
    fix: "Add the unit: `step: 5 ms`.",
  },
  "wrong-unit": {
    severity: "error",
    cause:
      "The unit has another dimension than the key. For feedback constants the dimension follows from coordinate and schedule.",
    example: "slew: { rise: 900 kPa, fall: 1500 kPa/s }",
    fix: "Use a unit of the dimension that the message names: `900 kPa/s`.",
  },
  "unknown-unit": {
    severity: "error",
    cause: "The unit is not one of the known units, or a compound is malformed.",
    example: "limit: 165000 rev/min",
    fix: "Use a known unit; compounds are written with * / ^ and parentheses: `kg*K^0.5/(s*Pa)`.",
  },
  "degree-sign": {
    severity: "error",
    cause: "A degree sign stands in a unit. It is hard to type and has several look-alikes.",
    example: "reference_temperature: 25 °C",
    fix: "Write `25 degC`, `77 degF` or `298.15 K`.",
  },
  "temperature-scale-in-compound": {
    severity: "error",
    cause: "The scales degC and degF have a shifted zero, so they cannot be part of a compound unit.",
    example: "wall_loss: 8 W/degC",
    fix: "Use K: `8 W/K`. A difference of 1 degC is 1 K.",
  },
  "pressure-without-reference": {
    severity: "error",
    cause: "A pressure level must say `abs` or `gauge`; the two differ by the weather.",
    example: "ceiling: 245 kPa",
    fix: "Write `245 kPa abs`.",
  },
  "reference-on-difference": {
    severity: "error",
    cause:
      "`abs` and `gauge` belong to pressure levels only. A difference, a rate or another quantity has neither.",
    example: "slew: { rise: 900 kPa/s abs, fall: 1500 kPa/s }",
    fix: "Remove the word.",
  },
  "gauge-not-allowed": {
    severity: "error",
    cause:
      "In a controller a gauge pressure moves with the measured ambient pressure, so it is allowed only in the target table.",
    example: "ceiling: 145 kPa gauge",
    fix: "Give the absolute pressure: `245 kPa abs`.",
  },
  "not-a-range": {
    severity: "error",
    cause: "The key takes a range with both ends.",
    example: "range: 9000 rpm",
    fix: "Write `0 rpm to 9000 rpm`.",
  },
  "wrong-order": {
    severity: "error",
    cause: "The first value of a range must be below the second.",
    example: "range: 350 kPa abs to 20 kPa abs",
    fix: "Swap the two values.",
  },
  "outside-limits": {
    severity: "error",
    cause:
      "The value is outside what is physically possible or sensible for this key. The message has a typical value.",
    example: "volumes: { boost: -10 l, intake: 6 l, exhaust: 3 l }",
    fix: "Correct the value or its unit.",
  },
  "unit-in-list": {
    severity: "error",
    cause: "A value of an axis or table carries a unit. These lists have one unit, given beside them.",
    example: "over: { opening: [0 %, 50 %, 100 %] }",
    fix: 'Write `over: { opening: [0, 50, 100], unit: "%" }`.',
  },
} as const satisfies Record<string, Explanation>;
