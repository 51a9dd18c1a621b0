import { type LevelKind, sameDimension } from "../quantities/convert.ts";
import { dimensionName } from "../quantities/dimension-name.ts";
import { readUnit, type Unit, type UnitFailure } from "../quantities/unit-expression.ts";
import type { Span } from "../span.ts";
import type { Choices, UnitChoice } from "../table/kind.ts";
import { NAMED_UNITS } from "../units.ts";
import type { Context, Place } from "./context.ts";
import { nearestName, quote } from "./suggest.ts";

export type Reference = "abs" | "gauge";

/** A unit as written, matched with the choice of the table it belongs to. */
export interface Match {
  readonly unit: Unit;
  readonly choice: UnitChoice;
  readonly reference?: Reference;
  readonly level: LevelKind;
  /** `kPa abs`. */
  readonly text: string;
}

const REFERENCE = /^(.*?)\s+(abs|gauge)$/;

/** Matches the text of a unit with the units a place takes, or reports why it does not fit. */
export function matchUnit(
  text: string,
  at: Span,
  units: readonly UnitChoice[],
  place: Place,
  context: Context,
): Match | undefined {
  const [, before = text, reference] = REFERENCE.exec(text) ?? [];
  const read = readUnit(before);
  if (!read.ok) return refuseUnit(read.failure, before, at, place, context);
  const active = units.filter((each) => isActive(each, context));
  const choice = active.find((each) => sameDimension(read.unit, each.base));
  if (choice === undefined) return refuseDimension(read.unit, at, units, active, place, context);
  return matchLevel(
    { unit: read.unit, choice, text },
    reference as Reference | undefined,
    at,
    place,
    context,
  );
}

function isActive(choice: UnitChoice, context: Context): boolean {
  return (["coordinate", "schedule"] as const).every((name: keyof Choices) => {
    const wanted = choice.when?.[name];
    const chosen = context.choices[name];
    return wanted === undefined || chosen === undefined || wanted.includes(chosen.word);
  });
}

function matchLevel(
  found: Pick<Match, "unit" | "choice" | "text">,
  reference: Reference | undefined,
  at: Span,
  place: Place,
  context: Context,
): Match | undefined {
  const { level, gauge } = found.choice;
  if (level === "temperature") return { ...found, level: "temperature_level" };
  if (level !== "pressure") {
    if (reference === undefined) return { ...found, level: "difference" };
    context.report({
      code: "reference-on-difference",
      at,
      message: `${place.name} is not a pressure level, so it cannot be \`${reference}\``,
      fix: place.fix,
    });
    return undefined;
  }
  if (reference === undefined) return refuseBarePressure(found.text, at, place, context);
  if (reference === "gauge" && gauge === "refused") return refuseGauge(at, place, context);
  const converts = reference === "gauge" && gauge === "against_standard_atmosphere";
  return { ...found, reference, level: converts ? "gauge_pressure" : "absolute_pressure" };
}

function refuseBarePressure(text: string, at: Span, place: Place, context: Context): undefined {
  context.report({
    code: "pressure-without-reference",
    at,
    message: `${place.name} is a pressure level and must say \`abs\` or \`gauge\``,
    label: `write \`${text} abs\` if it is against vacuum`,
    fix: place.fix,
  });
  return undefined;
}

function refuseGauge(at: Span, place: Place, context: Context): undefined {
  context.report({
    code: "gauge-not-allowed",
    at,
    message: `${place.name} must be an absolute pressure: gauge pressure moves with the weather`,
    label: "expected `abs`",
    fix: place.fix,
  });
  return undefined;
}

function refuseUnit(failure: UnitFailure, text: string, at: Span, place: Place, context: Context): undefined {
  if (/[°℃℉]/.test(text)) {
    const meant = /[FfK]|℉/.exec(text)?.[0];
    const unit = meant === "K" ? "K" : meant === undefined ? "degC" : "degF";
    context.report({
      code: "degree-sign",
      at,
      message: `the unit ${quote(text)} of ${place.name} has a degree sign`,
      label: `write ${unit}`,
      fix: place.fix,
    });
  } else if (failure.reason === "scale_in_compound")
    context.report({
      code: "temperature-scale-in-compound",
      at,
      message: `\`${failure.part}\` has a shifted zero and cannot stand inside ${quote(text)}`,
      label: "use K inside compound units",
      fix: place.fix,
    });
  else refuseUnknown(failure.part, text, at, place, context);
  return undefined;
}

function refuseUnknown(part: string, text: string, at: Span, place: Place, context: Context): void {
  const near = nearestUnit(part);
  context.report({
    code: "unknown-unit",
    at,
    message:
      part === text ? `${quote(text)} is not a unit` : `${quote(part)} in ${quote(text)} is not a unit`,
    ...(near === undefined ? {} : { label: `did you mean \`${near}\`?` }),
    fix: place.fix,
  });
}

const UNIT_NAMES = NAMED_UNITS.map((each) => each.name);
/** Signs that other programs write. */
const SPELLINGS: readonly (readonly [RegExp, string])[] = [
  [/²/g, "2"],
  [/³/g, "3"],
  [/[·⋅×]/g, "*"],
  [/^[µμ]/g, "u"],
  [/^sec(onds?)?$/i, "s"],
  [/^(rev|1)\/min$|^min$/i, "rpm"],
];

function nearestUnit(part: string): string | undefined {
  const spelt = SPELLINGS.reduce((text, [from, to]) => text.replace(from, to), part);
  if (spelt !== part) return spelt;
  const sameLetters = UNIT_NAMES.find((name) => name.toLowerCase() === part.toLowerCase());
  return sameLetters ?? nearestName(part, UNIT_NAMES);
}

const nameOf = (choice: UnitChoice): string =>
  choice.level === "pressure"
    ? "an absolute pressure"
    : choice.base.text === "" && choice.shown === ""
      ? "a plain number"
      : dimensionName(choice.base);

/** `a time`, `an area or a ratio`. */
export const expectedOf = (units: readonly UnitChoice[]): string =>
  [...new Set(units.map(nameOf))].join(" or ");

function refuseDimension(
  unit: Unit,
  at: Span,
  units: readonly UnitChoice[],
  active: readonly UnitChoice[],
  place: Place,
  context: Context,
): undefined {
  const because = reasons(unit, units, context);
  const shown = [...new Set(active.map((each) => each.shown))].filter((text) => text !== "");
  const expected = expectedOf(active);
  const inUnit = shown.length === 0 ? "" : `, in ${shown.join(" or ")}`;
  const bare = unit.text === "";
  context.report({
    code: bare ? "missing-unit" : "wrong-unit",
    at,
    message: bare
      ? `${place.name} needs ${expected}${inUnit}, got a number without a unit`
      : `${place.name} needs ${expected}, got ${dimensionName(unit)}`,
    label: bare ? `expected a unit${inUnit}` : `${dimensionName(unit)}; expected ${expected}${inUnit}`,
    ...(because.length === 0 ? {} : { because }),
    fix: place.fix,
  });
  return undefined;
}

/** The words elsewhere that rule out a unit the table knows for other choices. */
function reasons(unit: Unit, units: readonly UnitChoice[], context: Context) {
  const elsewhere = units.some((each) => sameDimension(unit, each.base));
  if (!elsewhere) return [];
  return (["coordinate", "schedule"] as const).flatMap((name) => {
    const chosen = context.choices[name];
    const decides = units.some((each) => each.when?.[name] !== undefined);
    return chosen === undefined || !decides
      ? []
      : [{ at: chosen.at, message: `the unit follows from \`${name}: ${chosen.word}\`` }];
  });
}
