import { availableParallelism } from "node:os";
import { basename, dirname, join, relative, resolve } from "node:path";
import type { LoopSpec } from "../../spec/index.ts";
import {
  evidenceText,
  loadController,
  type RequirementResult,
  startWorkers,
  type Verified,
  verifyLoop,
} from "../../verification/index.ts";
import { generatedController } from "../controller.ts";
import { EXIT, type ExitCode } from "../exit-codes.ts";
import { writeFileWhole } from "../files/write-file.ts";
import { jsonText, mention, refuse } from "../findings.ts";
import { loadLoop } from "../load-loop.ts";
import { openProgress } from "../progress.ts";
import { reportContext } from "../report-context.ts";
import { requireTests, selectTests } from "../require-tests.ts";
import type { Session } from "../session.ts";
import { VERSION } from "../version.ts";

export interface VerifyCommandOptions {
  readonly runs: number;
  readonly seed: number;
  readonly only: readonly string[];
  readonly jobs?: number;
  readonly evidence?: string;
  readonly report?: string;
  readonly agreement?: string;
}

/** Runs at the ends of the ranges, per scenario. */
const CORNERS = 20;
/** Most simulations spent on making one violation small. */
const SHRINK_BUDGET = 400;

async function runCampaign(
  loop: LoopSpec,
  options: VerifyCommandOptions,
  session: Session,
): Promise<Verified> {
  const controller = generatedController(loop);
  const port = await loadController(controller, loop);
  const { seed, runs } = options;
  const pool = startWorkers({ loop, controller, seed }, options.jobs ?? availableParallelism());
  const progress = await openProgress(session, "verify", "simulations");
  try {
    return await verifyLoop(loop, pool.runBatch, port, {
      toolVersion: VERSION,
      seed,
      runs,
      corners: CORNERS,
      shrinkBudget: SHRINK_BUDGET,
      form: "generated typescript",
      onProgress: ({ done, total }) => progress.update(done, total),
    });
  } finally {
    progress.end();
    await pool.close();
  }
}

/** Where counterexamples go: beside the evidence, else beside the report, else the current folder. */
const counterexampleFolder = ({ evidence, report }: VerifyCommandOptions): string =>
  dirname(evidence ?? report ?? "x");

/** The command that runs a counterexample again from here. */
function replayCommand(specPath: string, file: string): string {
  const beside = join(dirname(file), basename(specPath));
  const spec = resolve(beside) === resolve(specPath) ? "" : ` --spec ${relative(".", specPath)}`;
  return `spoolwright replay ${file}${spec}`;
}

async function writeAll(
  verified: Verified,
  loop: LoopSpec,
  options: VerifyCommandOptions,
): Promise<string[]> {
  const written: string[] = [];
  const write = (path: string, text: string): void => {
    writeFileWhole(path, text);
    written.push(path);
  };
  // The report is made before anything is written, so that a failure leaves nothing behind.
  const report = options.report === undefined ? undefined : await reportText(verified, loop, options);
  for (const { name, text } of verified.counterexamples)
    write(join(counterexampleFolder(options), name), text);
  if (options.evidence !== undefined) write(options.evidence, evidenceText(verified.evidence));
  if (options.report !== undefined && report !== undefined) write(options.report, report);
  return written;
}

async function reportText(
  verified: Verified,
  loop: LoopSpec,
  options: VerifyCommandOptions,
): Promise<string> {
  const { renderReport } = await import("../../verification/report/index.ts");
  return renderReport(verified.evidence, reportContext(loop, options.agreement));
}

/** `verify SPEC`: the campaign of random and corner runs, its evidence, counterexamples and report. */
export async function verify(
  specPath: string,
  options: VerifyCommandOptions,
  session: Session,
): Promise<ExitCode> {
  const loaded = loadLoop(specPath);
  if (loaded.value === undefined) return refuse(loaded, session, "nothing was verified");
  mention(loaded, session);
  const loop = selectTests(loaded.value, options.only);
  requireTests(loop);
  const begun = performance.now();
  const verified = await runCampaign(loop, options, session);
  const seconds = (performance.now() - begun) / 1000;
  const written = await writeAll(verified, loop, options);
  const { requirements, simulations, seed } = verified.evidence;
  const ok = requirements.every(({ verdict }) => verdict !== "violated");
  const folder = counterexampleFolder(options);
  if (session.json) {
    const rows = requirements.map((result) => jsonRow(result, folder));
    session.result(jsonText({ ok, seed, simulations, seconds, requirements: rows }));
  } else {
    for (const result of requirements) session.note(requirementLine(result));
    for (const result of requirements)
      if (result.verdict === "violated") session.complain(violation(result, specPath, folder));
    session.note(`seed ${seed}: ${simulations} simulations in ${seconds.toFixed(1)} s`);
    for (const path of written) session.note(`wrote ${path}`);
  }
  return ok ? EXIT.fine : EXIT.findings;
}

function jsonRow(result: RequirementResult, folder: string) {
  const { id, scenario, verdict, runs, exercised, violations, worst, counterexample } = result;
  return {
    id,
    scenario,
    verdict,
    runs,
    exercised,
    violations,
    worst_margin: worst?.margin ?? null,
    violation_probability_upper_95: result.violationProbabilityUpper95,
    counterexample: counterexample === undefined ? null : join(folder, counterexample),
  };
}

const VERDICTS = { holds: "holds", violated: "violated", not_exercised: "not exercised" } as const;

function requirementLine({
  id,
  scenario,
  verdict,
  exercised,
  worst,
  violationProbabilityUpper95,
}: RequirementResult): string {
  const margin = worst === undefined ? "" : `, worst margin ${worst.margin.toFixed(3)}`;
  const bound =
    exercised > 0 ? `, violation below ${(violationProbabilityUpper95 * 100).toPrecision(2)} % (95 %)` : "";
  return `${VERDICTS[verdict].padEnd(13)} ${id.padEnd(24)} ${scenario.padEnd(16)} ${exercised} runs${margin}${bound}`;
}

/** What broke, where it is written, and the command that shows it again. */
function violation(result: RequirementResult, specPath: string, folder: string): string {
  const { id, says, scenario, exercised, violations, corners, worst, at, counterexample } = result;
  const inRandom = `${violations} of ${exercised} random runs`;
  const where =
    corners.violations > 0
      ? `${inRandom} and ${corners.violations} of ${corners.runs} corner runs`
      : inRandom;
  const margin = (violations > 0 ? worst : corners.worst)?.margin.toFixed(3);
  const again =
    counterexample === undefined ? [] : [`  again: ${replayCommand(specPath, join(folder, counterexample))}`];
  return [
    `requirement \`${id}\` violated in ${where} of \`${scenario}\`; worst margin ${margin}`,
    `  ${says}   ${at.file}:${at.line}`,
    ...again,
  ].join("\n");
}
