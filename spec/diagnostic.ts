import type { Span } from "./span.ts";

export type Severity = "error" | "warning" | "hint";

/** One finding about a spec file, as data; prose around it is added by `renderDiagnostics`. */
export interface Diagnostic {
  readonly code: string;
  readonly severity: Severity;
  readonly at: Span;
  /** This instance: names, values, units. Lower case, no full stop. */
  readonly message: string;
  /** Short text under the caret, useful alone. */
  readonly label?: string;
  /** The other place. */
  readonly because?: readonly { readonly at: Span; readonly message: string }[];
  /** A line that can be pasted. */
  readonly fix?: string;
}
