import type { Diagnostic, Severity } from "../diagnostic.ts";
import type { Span } from "../span.ts";

export interface JsonPlace extends Span {
  readonly message: string;
}

export interface JsonDiagnostic extends JsonPlace {
  readonly code: string;
  readonly severity: Severity;
  readonly label: string | null;
  readonly because: readonly JsonPlace[];
  readonly fix: string | null;
}

export interface JsonDiagnostics {
  /** No error among them. */
  readonly ok: boolean;
  readonly diagnostics: readonly JsonDiagnostic[];
}

const span = ({ file, line, column, endLine, endColumn }: Span): Span => ({
  file,
  line,
  column,
  endLine,
  endColumn,
});

/** The shape of `check --json`, stable for other programs; further fields may be added. */
export function diagnosticsJson(diagnostics: readonly Diagnostic[]): JsonDiagnostics {
  return {
    ok: diagnostics.every(({ severity }) => severity !== "error"),
    diagnostics: diagnostics.map(({ code, severity, at, message, label, because = [], fix }) => ({
      code,
      severity,
      ...span(at),
      message,
      label: label ?? null,
      because: because.map((other) => ({ ...span(other.at), message: other.message })),
      fix: fix ?? null,
    })),
  };
}
