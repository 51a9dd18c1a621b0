import type { Program } from "../ir/program.ts";
import type { Entry } from "../lowered.ts";
import { blockComment } from "../print/comment-text.ts";
import { upperCase } from "../print/identifiers.ts";
import type { Names } from "../print/names.ts";

const MICROSECONDS_PER_SECOND = 1e6;

/** Whole microseconds; undefined where the period is not whole: a rounded one would drift. */
const wholeMicroseconds = (periodS: number): number | undefined => {
  const whole = Math.round(periodS * MICROSECONDS_PER_SECOND);
  return Math.abs(whole / MICROSECONDS_PER_SECOND - periodS) <= periodS * 1e-12 ? whole : undefined;
};

interface PeriodMacro {
  readonly macro: string;
  readonly microseconds: number;
}

const periodMacros = (program: Program, names: Names): readonly PeriodMacro[] =>
  program.entries.flatMap((entry) => {
    const microseconds = entry.periodS === undefined ? undefined : wholeMicroseconds(entry.periodS);
    const macro = `${upperCase(names.function(entry.function))}_PERIOD_US`;
    return microseconds === undefined ? [] : [{ macro, microseconds }];
  });

/** When to call an entry, with the period of a step. */
export const whenSentences = ({ when, periodS }: Entry): string =>
  periodS === undefined ? when : `${when} Call it every ${Number((periodS * 1000).toPrecision(12))} ms.`;

/** Periods for the caller's scheduler, exact or not at all. */
export const printPeriods = (program: Program, names: Names): readonly string[] => {
  const macros = periodMacros(program, names);
  return macros.length === 0
    ? []
    : [
        "",
        ...blockComment(["Time between two calls of a step, microseconds."], ""),
        ...macros.map(({ macro, microseconds }) => `#define ${macro} (${microseconds})`),
      ];
};

/** Refuses a header of another generation: its caller would run the steps at the wrong times. */
export const printPeriodGuards = (program: Program, names: Names): readonly string[] =>
  periodMacros(program, names).flatMap(({ macro, microseconds }) => [
    `#if (${macro} != ${microseconds})`,
    `#error "${program.name}.h was not generated together with this file: ${macro} must be ${microseconds}"`,
    "#endif",
  ]);
