import { diagnosticsJson } from "../../spec/index.ts";
import { EXIT, type ExitCode } from "../exit-codes.ts";
import { findingsText, jsonText } from "../findings.ts";
import { loadLoop } from "../load-loop.ts";
import type { Session } from "../session.ts";

/** `check SPEC`: everything that is wrong with a spec, in one run. */
export function check(specPath: string, session: Session): ExitCode {
  const loaded = loadLoop(specPath);
  if (session.json) session.result(jsonText(diagnosticsJson(loaded.diagnostics)));
  else if (loaded.diagnostics.length > 0) session.complain(findingsText(loaded, session));
  if (loaded.value === undefined) return EXIT.findings;
  if (!session.json) session.note(`${specPath}: no errors`);
  return EXIT.fine;
}
