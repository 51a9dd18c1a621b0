import { type LevelKind, sameDimension } from "../quantities/convert.ts";
import { readUnit, type Unit } from "../quantities/unit-expression.ts";
import type { Span } from "../span.ts";
import type { UnitChoice } from "../table/kind.ts";
import { activeUnits } from "./active-units.ts";
import type { Context, Place } from "./context.ts";
import {
  refuseBarePressure,
  refuseDimension,
  refuseGauge,
  refuseReference,
  refuseUnit,
} from "./refuse-unit.ts";

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
  const active = activeUnits(units, context);
  const choice = active.find((each) => sameDimension(read.unit, each.base));
  if (choice === undefined) return refuseDimension(read.unit, at, units, place, context);
  return matchLevel(
    { unit: read.unit, choice, text },
    reference as Reference | undefined,
    at,
    place,
    context,
  );
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
    return refuseReference(reference, at, place, context);
  }
  if (reference === undefined) return refuseBarePressure(found.text, at, place, context);
  if (reference === "gauge" && gauge === "refused") return refuseGauge(at, place, context);
  const converts = reference === "gauge" && gauge === "against_standard_atmosphere";
  return { ...found, reference, level: converts ? "gauge_pressure" : "absolute_pressure" };
}
