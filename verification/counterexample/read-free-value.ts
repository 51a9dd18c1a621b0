import { type Context, readQuantity, type Span } from "../../spec/index.ts";
import type { FreeValue } from "../fix-scenario.ts";
import { UNIT_CHOICES } from "../free-units.ts";

/** Ranges are compared with this much room for the last digits, as a ratio of the larger end. */
const SLACK = 1e-9;

/** A value as written, in the base unit of its place; reports what is wrong, and a value outside the scenario's range. */
export function readFreeValue(
  written: string,
  at: Span,
  value: FreeValue,
  context: Context,
): number | undefined {
  const choice = UNIT_CHOICES[value.base];
  const example = `${value.free.low} ${choice.shown}`;
  const place = { name: `\`${value.name}\``, example, fix: `value: ${example}` };
  const node = { kind: "scalar", text: written, quoted: false, at } as const;
  const read = readQuantity(node, { units: [choice], limits: {} }, place, context);
  if (read === undefined) return undefined;
  const { low, high, unit } = value.free;
  const slack = SLACK * Math.max(Math.abs(low), Math.abs(high));
  if (read.value >= low - slack && read.value <= high + slack) return read.value;
  context.report({
    code: "outside-limits",
    at,
    message: `${place.name} is ${written}, outside the scenario's range`,
    label: `between ${low} and ${high} in base units (written in ${unit || "a bare ratio"})`,
  });
  return undefined;
}
