import { availableParallelism } from "node:os";
import { dirname, join } from "node:path";
import type { LoopSpec } from "../../spec/index.ts";
import {
  counterexampleName,
  evidenceText,
  loadController,
  neverExercised,
  requirementsOf,
  startWorkers,
  type Verified,
  verifyLoop,
} from "../../verification/index.ts";
import type { ReportContext } from "../../verification/report/index.ts";
import { generatedController } from "../controller.ts";
import { EXIT, type ExitCode } from "../exit-codes.ts";
import { type Outputs, requireOutputs } from "../files/require-outputs.ts";
import { writeFileWhole } from "../files/write-file.ts";
import { jsonText, mention, refuse } from "../findings.ts";
import { loadLoop } from "../load-loop.ts";
import { openProgress } from "../progress.ts";
import { reportContext } from "../report-context.ts";
import { requireTests, selectTests } from "../require-tests.ts";
import type { Session } from "../session.ts";
import { jsonRow, requirementLine, untestedText, violationText } from "../verify-text.ts";
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
  whole: LoopSpec,
  options: VerifyCommandOptions,
  session: Session,
): Promise<Verified> {
  const loop = selectTests(whole, options.only);
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
      whole,
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

/** Everything the campaign may write, every counterexample it may find among it. */
function outputsOf(whole: LoopSpec, options: VerifyCommandOptions): Outputs {
  const loop = selectTests(whole, options.only);
  const names = loop.scenarios.flatMap((scenario) =>
    requirementsOf(loop, scenario).map(({ id }) => counterexampleName(id, scenario.name)),
  );
  const folder = counterexampleFolder(options);
  const found = names.map((name) => [`counterexample ${name}`, join(folder, name)]);
  return { "--evidence": options.evidence, "--report": options.report, ...Object.fromEntries(found) };
}

/** Writes what was asked for; the report is made first, so that a failure leaves nothing behind. */
async function writeAll(
  verified: Verified,
  options: VerifyCommandOptions,
  context: ReportContext | undefined,
): Promise<string[]> {
  const folder = counterexampleFolder(options);
  const files = new Map(verified.counterexamples.map(({ name, text }) => [join(folder, name), text]));
  if (options.evidence !== undefined) files.set(options.evidence, evidenceText(verified.evidence));
  if (options.report !== undefined) {
    const { renderReport } = await import("../../verification/report/index.ts");
    files.set(options.report, renderReport(verified.evidence, context));
  }
  for (const [path, text] of files) writeFileWhole(path, text);
  return [...files.keys()];
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
  requireTests(selectTests(loaded.value, options.only), options.only);
  requireOutputs(outputsOf(loaded.value, options), [
    options.agreement,
    ...loaded.sources.map(({ file }) => file),
  ]);
  const context = options.report === undefined ? undefined : reportContext(loaded.value, options.agreement);
  const begun = performance.now();
  const verified = await runCampaign(loaded.value, options, session);
  const seconds = (performance.now() - begun) / 1000;
  const written = await writeAll(verified, options, context);
  return tell(verified, { specPath, folder: counterexampleFolder(options), seconds, written }, session);
}

interface Told {
  readonly specPath: string;
  readonly folder: string;
  readonly seconds: number;
  readonly written: readonly string[];
}

function tell(
  { evidence }: Verified,
  { specPath, folder, seconds, written }: Told,
  session: Session,
): ExitCode {
  const { requirements, simulations, seed } = evidence;
  const violated = requirements.filter(({ verdict }) => verdict === "violated");
  const untested = neverExercised(requirements);
  const ok = violated.length === 0 && untested.length === 0;
  if (session.json) {
    const rows = requirements.map((result) => jsonRow(result, folder));
    session.result(jsonText({ ok, seed, simulations, seconds, requirements: rows }));
  } else {
    for (const result of requirements) session.note(requirementLine(result));
    for (const result of violated) session.complain(violationText(result, specPath, folder));
    for (const result of untested) session.complain(untestedText(result));
    session.note(`seed ${seed}: ${simulations} simulations in ${seconds.toFixed(1)} s`);
    for (const path of written) session.note(`wrote ${path}`);
  }
  return ok ? EXIT.fine : EXIT.findings;
}
