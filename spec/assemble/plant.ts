import type { PlantSpec } from "../plant-spec.ts";
import type { Quantity, Range } from "../quantity.ts";
import type { Span } from "../span.ts";
import { camel } from "../table/camel.ts";
import type { Value } from "../table/kind.ts";
import type { PLANT_BLOCK } from "../table/plant-table.ts";

type Plant = Value<typeof PLANT_BLOCK, "whole">;

/** Quantities become numbers, ranges pairs; the shape stays. */
type Numbers<T> = T extends Quantity
  ? number
  : T extends Range
    ? readonly [number, number]
    : T extends readonly Quantity[]
      ? readonly number[]
      : T extends string
        ? T
        : { readonly [K in keyof T as Exclude<K, "span" | "places">]: Numbers<T[K]> };

const isQuantity = (value: object): value is Quantity => "value" in value && "written" in value;
const isRange = (value: object): value is Range => "low" in value && "high" in value;

function numbersOf(value: unknown): unknown {
  if (typeof value !== "object" || value === null) return value;
  if (isQuantity(value)) return value.value;
  if (isRange(value)) return [value.low.value, value.high.value];
  if (Array.isArray(value)) return value.map(numbersOf);
  const entries = Object.entries(value).filter(([key]) => key !== "span" && key !== "places");
  return Object.fromEntries(entries.map(([key, inner]) => [key, numbersOf(inner)]));
}

/** Dotted path as written in the file to the span of each value, blocks included. */
function placesOf(value: unknown, prefix: string, into: Map<string, Span>): Map<string, Span> {
  if (typeof value !== "object" || value === null || !("places" in value)) return into;
  const block = value as { readonly places: Readonly<Record<string, Span>> } & Record<string, unknown>;
  for (const [key, span] of Object.entries(block.places)) {
    into.set(`${prefix}${key}`, span);
    placesOf(block[camel(key)], `${prefix}${key}.`, into);
  }
  return into;
}

/** The plant in SI numbers, from what was read without an error. */
export function assemblePlant(read: Plant): PlantSpec {
  const numbers = numbersOf(read) as Numbers<Plant>;
  return {
    ...(numbers as Omit<PlantSpec, "places" | "at">),
    places: placesOf(read, "", new Map()),
    at: read.span,
  };
}
