import { diagnosticsJson, renderDiagnostics } from "../spec/index.ts";
import { EXIT, type ExitCode } from "./exit-codes.ts";
import type { Loaded } from "./load-loop.ts";
import type { Session } from "./session.ts";

const WIDTH_WITHOUT_TERMINAL = 80;

/** Findings as text for people. */
export function findingsText(loaded: Loaded<unknown>, session: Session, consequence?: string): string {
  return renderDiagnostics(loaded.diagnostics, loaded.sources, {
    colour: session.colour,
    width: process.stderr.columns ?? WIDTH_WITHOUT_TERMINAL,
    ...(consequence === undefined ? {} : { consequence }),
  });
}

/** Shows warnings and hints of a file that can be used; `--json` documents carry their own. */
export function mention(loaded: Loaded<unknown>, session: Session): void {
  if (!session.json && !session.quiet && loaded.diagnostics.length > 0) {
    session.complain(findingsText(loaded, session));
  }
}

/** Ends a command whose file has errors. */
export function refuse(loaded: Loaded<unknown>, session: Session, consequence: string): ExitCode {
  if (session.json) session.result(jsonText(diagnosticsJson(loaded.diagnostics)));
  else session.complain(findingsText(loaded, session, consequence));
  return EXIT.findings;
}

export const jsonText = (document: unknown): string => JSON.stringify(document, null, 2);
