import { basename, dirname, join, relative, resolve } from "node:path";
import { percentUp, type RequirementResult, whyNotExercised } from "../verification/index.ts";

const VERDICTS = { holds: "holds", violated: "violated", not_exercised: "not exercised" } as const;

/** One line of the table: verdict, requirement, scenario, and what the runs showed. */
export function requirementLine(result: RequirementResult): string {
  const { id, scenario, verdict, runs, exercised } = result;
  const count = exercised === runs ? `${runs} runs` : `${exercised} of ${runs} runs`;
  const shown = verdict === "not_exercised" ? silence(result) : figures(result);
  return `${VERDICTS[verdict].padEnd(13)} ${id.padEnd(24)} ${scenario.padEnd(16)} ${count}${shown}`;
}

function figures(result: RequirementResult): string {
  const bound = `, violation below ${percentUp(result.violationProbabilityUpper95)} % (95 %)`;
  return `, worst margin ${worstText(result)}${result.exercised > 0 ? bound : ""}`;
}

function silence({ pattern, corners }: RequirementResult): string {
  const inCorners =
    corners.exercised > 0 ? `; exercised in ${corners.exercised} of ${corners.runs} corner runs only` : "";
  return `: ${whyNotExercised(pattern)}${inCorners}`;
}

/** The least margin of random and corner runs; a corner's is named so, since it enters no count and no bound. */
function worstText({ worst, corners }: RequirementResult): string {
  const random = worst?.margin ?? Infinity;
  const corner = corners.worst?.margin ?? Infinity;
  return corner < random ? `${corner.toFixed(3)} (corner run)` : random.toFixed(3);
}

/** The command that runs a counterexample again from here. */
export function replayCommand(specPath: string, file: string): string {
  const beside = join(dirname(file), basename(specPath));
  const spec = resolve(beside) === resolve(specPath) ? "" : ` --spec ${relative(".", specPath)}`;
  return `spoolwright replay ${file}${spec}`;
}

/** What broke, where it is written, and the command that shows it again. */
export function violationText(result: RequirementResult, specPath: string, folder: string): string {
  const { id, says, scenario, exercised, violations, corners, at, counterexample } = result;
  const inCorners = corners.violations > 0 ? ` and ${corners.violations} of ${corners.runs} corner runs` : "";
  const again =
    counterexample === undefined ? [] : [`  again: ${replayCommand(specPath, join(folder, counterexample))}`];
  return [
    `requirement \`${id}\` violated in ${violations} of ${exercised} random runs${inCorners} of \`${scenario}\`; worst margin ${worstText(result)}`,
    `  ${says}   ${at.file}:${at.line}`,
    ...again,
  ].join("\n");
}

/** A requirement that no run exercised, in none of its scenarios among those that were run. */
export function untestedText({ id, says, pattern, at }: RequirementResult): string {
  return [
    `requirement \`${id}\` not exercised in any scenario, so not tested: ${whyNotExercised(pattern)}`,
    `  ${says}   ${at.file}:${at.line}`,
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
    corner_exercised: corners.exercised,
    corner_violations: corners.violations,
    corner_worst_margin: corners.worst?.margin ?? null,
    counterexample: counterexample === undefined ? null : join(folder, counterexample),
  };
}
