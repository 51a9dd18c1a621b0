import { basename, dirname, join, relative, resolve } from "node:path";
import type { RequirementResult } from "../verification/index.ts";

const VERDICTS = { holds: "holds", violated: "violated", not_exercised: "not exercised" } as const;

/** One line of the table: verdict, requirement, scenario, random runs with the worst margin and the bound. */
export function requirementLine(result: RequirementResult): string {
  const { id, scenario, verdict, exercised, worst, violationProbabilityUpper95 } = result;
  const margin = worst === undefined ? "" : `, worst margin ${worst.margin.toFixed(3)}`;
  const percent = (violationProbabilityUpper95 * 100).toPrecision(2);
  const bound = exercised > 0 ? `, violation below ${percent} % (95 %)` : "";
  return `${VERDICTS[verdict].padEnd(13)} ${id.padEnd(24)} ${scenario.padEnd(16)} ${exercised} runs${margin}${bound}`;
}

/** The command that runs a counterexample again from here. */
export function replayCommand(specPath: string, file: string): string {
  const beside = join(dirname(file), basename(specPath));
  const spec = resolve(beside) === resolve(specPath) ? "" : ` --spec ${relative(".", specPath)}`;
  return `spoolwright replay ${file}${spec}`;
}

/** What broke, where it is written, and the command that shows it again. */
export function violationText(result: RequirementResult, specPath: string, folder: string): string {
  const { id, says, scenario, exercised, violations, corners, worst, at, counterexample } = result;
  const inCorners = corners.violations > 0 ? ` and ${corners.violations} of ${corners.runs} corner runs` : "";
  const margin = (violations > 0 ? worst : corners.worst)?.margin.toFixed(3);
  const again =
    counterexample === undefined ? [] : [`  again: ${replayCommand(specPath, join(folder, counterexample))}`];
  return [
    `requirement \`${id}\` violated in ${violations} of ${exercised} random runs${inCorners} of \`${scenario}\`; worst margin ${margin}`,
    `  ${says}   ${at.file}:${at.line}`,
    ...again,
  ].join("\n");
}

/** A row of `verify --json`; the names are stable. */
export function jsonRow(result: RequirementResult, folder: string) {
  const { id, scenario, verdict, runs, exercised, violations, corners, worst, counterexample } = result;
  return {
    id,
    scenario,
    verdict,
    runs,
    exercised,
    violations,
    worst_margin: worst?.margin ?? null,
    violation_probability_upper_95: result.violationProbabilityUpper95,
    corner_runs: corners.runs,
    corner_violations: corners.violations,
    counterexample: counterexample === undefined ? null : join(folder, counterexample),
  };
}
