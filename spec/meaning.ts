import type { LoopSpec } from "./loop-spec.ts";
import type { PlantSpec } from "./plant-spec.ts";
import type { Duration, Quantity } from "./quantity.ts";

/** What a reader of the file sees but the loop does not: places, wording, units as written, file names. */
const NOT_MEANING = new Set([
  "at",
  "places",
  "written",
  "unit",
  "axisUnit",
  "rowsUnit",
  "columnsUnit",
  "description",
  "says",
]);

const isDuration = (value: object): value is Duration => "numerator" in value && "denominator" in value;
const isQuantity = (value: object): value is Quantity => "value" in value && "written" in value;

/** Shortest text that gives back the same double, with the sign of zero. */
const numberText = (value: number): string => (Object.is(value, -0) ? "-0" : String(value));

function leafText(value: unknown): string | undefined {
  if (typeof value === "number") return numberText(value);
  if (typeof value === "string") return JSON.stringify(value);
  if (typeof value === "boolean") return String(value);
  if (typeof value !== "object" || value === null) return undefined;
  if (isDuration(value)) return `${value.numerator}/${value.denominator} s`;
  if (isQuantity(value)) return numberText(value.value);
  const list = Array.isArray(value) ? value.map(leafText) : [undefined];
  return list.every((each) => each !== undefined) ? `[${list.join(" ")}]` : undefined;
}

/** One line `path value` for each leaf, in the order of the paths. */
function lines(value: unknown, path: string): string[] {
  const leaf = leafText(value);
  if (leaf !== undefined) return [`${path} ${leaf}`];
  if (typeof value !== "object" || value === null) return [];
  const names = Object.keys(value).filter((name) => !NOT_MEANING.has(name));
  const members = value as Readonly<Record<string, unknown>>;
  const ordered = Array.isArray(value) ? names : names.sort();
  return ordered.flatMap((name) => lines(members[name], `${path}.${name}`));
}

const text = (all: readonly string[]): string => `${all.join("\n")}\n`;

/**
 * The meaning of the controller as canonical text: base units, sorted, without comments, layout, wording or the
 * unit a value was written in. Two files with equal text give the same code and calibration.
 */
export const meaningText = (spec: LoopSpec): string => text(lines(spec.controller, "controller"));

export const plantMeaningText = (plant: PlantSpec): string => text(lines(plant, "plant"));

/** The meaning of what the controller is tested against: plant, scenarios and requirements. */
export const campaignMeaningText = (spec: LoopSpec): string =>
  text([
    ...(spec.plant === undefined ? [] : lines(spec.plant, "plant")),
    ...lines(spec.scenarios, "scenarios"),
    ...lines(spec.requirements, "requirements"),
  ]);
