import { convertQuantity } from "../quantities/convert.ts";
import { readUnit } from "../quantities/unit-expression.ts";
import type { Limits, UnitChoice } from "../table/kind.ts";
import type { Context, Place } from "./context.ts";
import type { Amount } from "./read-quantity.ts";

const WORDS = { above: "above", atLeast: "at least", below: "below", atMost: "at most" } as const;
const HOLDS: Record<keyof Limits, (value: number, bound: number) => boolean> = {
  above: (value, bound) => value > bound,
  atLeast: (value, bound) => value >= bound,
  below: (value, bound) => value < bound,
  atMost: (value, bound) => value <= bound,
};

/** A bound of the table in the base unit of the value. */
export function boundOf(text: string, choice: UnitChoice): number {
  const [number, ...rest] = text.split(" ");
  const unit = readUnit(rest.filter((word) => word !== "abs").join(" "));
  if (!unit.ok || rest.length === 0) return Number(number);
  const level = choice.level === "temperature" ? "temperature_level" : "difference";
  return convertQuantity(number, unit.unit, choice.base, level);
}

/** Sizes that a float32 holds with room to multiply two of them; no quantity of a boost loop is near either end. */
const LARGEST = 1e18;
const SMALLEST = 1e-18;

/** A tiny value is as good as zero, and wrong only where zero is. */
const isComputable = (value: number, { above }: Limits): boolean =>
  Math.abs(value) <= LARGEST && (above === undefined || value === 0 || Math.abs(value) >= SMALLEST);

/** True when the value can be computed with and is inside the limits; else reports the first that is broken. */
export function checkLimits(amount: Amount, limits: Limits, place: Place, context: Context): boolean {
  if (!isComputable(amount.value, limits)) {
    context.report({
      code: "not-finite",
      at: amount.at,
      message: `${place.name}: ${amount.written} is too ${Math.abs(amount.value) < 1 ? "small" : "large"} to compute with`,
      label: "check the exponent and the unit",
      fix: place.fix,
    });
    return false;
  }
  const broken = (Object.keys(limits) as (keyof Limits)[]).find(
    (name) => !HOLDS[name](amount.value, boundOf(limits[name] ?? "0", amount.match.choice)),
  );
  if (broken === undefined) return true;
  context.report({
    code: "outside-limits",
    at: amount.at,
    message: `${place.name} must be ${WORDS[broken]} ${limits[broken]}, got ${amount.written}`,
    label: `${WORDS[broken]} ${limits[broken]}; typical: ${place.example}`,
    fix: place.fix,
  });
  return false;
}
