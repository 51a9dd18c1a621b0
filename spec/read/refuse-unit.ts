import { sameDimension } from "../quantities/convert.ts";
import { dimensionName } from "../quantities/dimension-name.ts";
import type { Unit, UnitFailure } from "../quantities/unit-expression.ts";
import type { Span } from "../span.ts";
import type { UnitChoice } from "../table/kind.ts";
import { NAMED_UNITS } from "../units.ts";
import { activeUnits, decidingChoices, expectedOf } from "./active-units.ts";
import type { Context, Place } from "./context.ts";
import { nearestName, quote } from "./suggest.ts";

export function refuseBarePressure(text: string, at: Span, place: Place, context: Context): undefined {
  context.report({
    code: "pressure-without-reference",
    at,
    message: `${place.name} is a pressure level and must say \`abs\` or \`gauge\``,
    label: `write \`${text} abs\` if it is against vacuum`,
    fix: place.fix,
  });
  return undefined;
}

export function refuseGauge(at: Span, place: Place, context: Context): undefined {
  context.report({
    code: "gauge-not-allowed",
    at,
    message: `${place.name} must be an absolute pressure: gauge pressure moves with the weather`,
    label: "expected `abs`",
    fix: place.fix,
  });
  return undefined;
}

export function refuseUnit(
  failure: UnitFailure,
  text: string,
  at: Span,
  place: Place,
  context: Context,
): undefined {
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
  const near = nearestUnit(text) ?? nearestUnit(part);
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
  [/^(msec|millis(econds?)?)$/i, "ms"],
  [/^(rev|revs|r|U|1)\/min$/i, "rpm"],
];

function nearestUnit(part: string): string | undefined {
  const spelt = SPELLINGS.reduce((text, [from, to]) => text.replace(from, to), part);
  if (spelt !== part) return spelt;
  const sameLetters = UNIT_NAMES.find((name) => name.toLowerCase() === part.toLowerCase());
  return sameLetters ?? nearestName(part, UNIT_NAMES);
}

export function refuseReference(reference: string, at: Span, place: Place, context: Context): undefined {
  context.report({
    code: "reference-on-difference",
    at,
    message: `${place.name} is not a pressure level, so it cannot be \`${reference}\``,
    label: `remove \`${reference}\``,
    fix: place.fix,
  });
  return undefined;
}

/** A unit of another dimension, or none where one is needed. */
export function refuseDimension(
  unit: Unit,
  at: Span,
  units: readonly UnitChoice[],
  place: Place,
  context: Context,
): undefined {
  const active = activeUnits(units, context);
  const elsewhere = units.some((each) => sameDimension(unit, each.base));
  const because = elsewhere ? decidingChoices(units, context) : [];
  const shown = [...new Set(active.map((each) => each.shown))].filter((text) => text !== "");
  const expected = expectedOf(units, context);
  const inUnit = shown.length === 0 || expected.includes(" in ") ? "" : `, in ${shown.join(" or ")}`;
  const got = unit.text === "" ? "a number without a unit" : dimensionName(unit);
  context.report({
    code: unit.text === "" ? "missing-unit" : "wrong-unit",
    at,
    message: `${place.name} needs ${expected}${inUnit}, got ${got}`,
    label: unit.text === "" ? `expected ${expected}${inUnit}` : `${got}; expected ${expected}${inUnit}`,
    ...(because.length === 0 ? {} : { because }),
    fix: place.fix,
  });
  return undefined;
}
