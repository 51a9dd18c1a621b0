import { convertQuantity } from "./convert.ts";
import { knownUnit } from "./unit-expression.ts";

/** One revolution per minute in radians per second, the nearest double. */
export const RADIANS_PER_SECOND_PER_RPM = convertQuantity(
  "1",
  knownUnit("rpm"),
  knownUnit("rad/s"),
  "difference",
);
