import type { LoopSpec } from "../../spec/index.ts";
import type { Evidence } from "../../verification/index.ts";
import { renderReport } from "../../verification/report/index.ts";
import { CommandFailure } from "../command-failure.ts";
import { EXIT, type ExitCode } from "../exit-codes.ts";
import { requireOutputs } from "../files/require-outputs.ts";
import { writeFileWhole } from "../files/write-file.ts";
import { jsonText, refuse } from "../findings.ts";
import { type Loaded, loadLoop } from "../load-loop.ts";
import { readJson, reportContext } from "../report-context.ts";
import type { Session } from "../session.ts";

export interface ReportOptions {
  readonly out: string;
  /** For the calibration table and the figures of the code. */
  readonly spec?: string;
  readonly agreement?: string;
}

/** Evidence comes from a file that anybody may have written: what cannot be drawn is the file's fault. */
function pageOf(path: string, context: ReturnType<typeof reportContext>): string {
  const evidence = readJson(path, "evidence") as Partial<Evidence> | null;
  if (evidence?.format !== 1 || !Array.isArray(evidence.requirements) || !Array.isArray(evidence.traces)) {
    throw new CommandFailure(`${path} is not evidence of this version (\`"format": 1\`)`, EXIT.findings);
  }
  try {
    return renderReport(evidence as Evidence, context);
  } catch (error) {
    if (!(error instanceof TypeError || error instanceof RangeError)) throw error;
    throw new CommandFailure(`${path} is not whole: ${error.message}`, EXIT.findings);
  }
}

/** `report EVIDENCE`: the HTML report of an evidence file. */
export function report(evidencePath: string, options: ReportOptions, session: Session): ExitCode {
  const loaded: Loaded<LoopSpec> =
    options.spec === undefined ? { diagnostics: [], sources: [] } : loadLoop(options.spec);
  if (options.spec !== undefined && loaded.value === undefined)
    return refuse(loaded, session, "no report was written");
  const read = [evidencePath, options.agreement, ...loaded.sources.map(({ file }) => file)];
  requireOutputs({ "--out": options.out }, read);
  const page = pageOf(evidencePath, reportContext(loaded.value, options.agreement));
  writeFileWhole(options.out, page);
  if (session.json) session.result(jsonText({ ok: true, report: options.out }));
  else session.note(`wrote ${options.out}`);
  return EXIT.fine;
}
