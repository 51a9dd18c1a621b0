import { dimensionName } from "../quantities/dimension-name.ts";
import type { Choices, UnitChoice } from "../table/kind.ts";
import type { Context } from "./context.ts";

const CHOICES = ["coordinate", "schedule"] as const satisfies readonly (keyof Choices)[];

/** The units that the words elsewhere in the file leave; all of them while those words are unknown. */
export const activeUnits = (units: readonly UnitChoice[], context: Context): readonly UnitChoice[] =>
  units.filter((unit) =>
    CHOICES.every((name) => {
      const wanted = unit.when?.[name];
      const chosen = context.choices[name];
      return wanted === undefined || chosen === undefined || wanted.includes(chosen.word);
    }),
  );

/** The words elsewhere that rule some of the units out. */
export const decidingChoices = (units: readonly UnitChoice[], context: Context) =>
  CHOICES.flatMap((name) => {
    const chosen = context.choices[name];
    const decides = units.some((unit) => unit.when?.[name] !== undefined);
    return chosen === undefined || !decides
      ? []
      : [{ at: chosen.at, message: `the unit follows from \`${name}: ${chosen.word}\`` }];
  });

function nameOf({ level, base, shown }: UnitChoice): string {
  if (level === "pressure") return "an absolute pressure";
  if (base.text === "" && shown === "") return "a plain number";
  const name = dimensionName(base);
  return name.startsWith("a quantity") ? `a quantity in ${shown}` : name;
}

/** `a time`, `an area or a ratio`. */
export const expectedOf = (units: readonly UnitChoice[], context: Context): string =>
  [...new Set(activeUnits(units, context).map(nameOf))].join(" or ");
