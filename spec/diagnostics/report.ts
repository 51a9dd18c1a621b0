import type { Diagnostic } from "../diagnostic.ts";
import type { Span } from "../span.ts";
import { CATALOGUE, type Code } from "./catalogue.ts";

/** What a reader or rule says about one place; severity comes from the catalogue. */
export interface Finding {
  readonly code: Code;
  readonly at: Span;
  readonly message: string;
  readonly label?: string;
  readonly because?: readonly { readonly at: Span; readonly message: string }[];
  /** Empty: none. */
  readonly fix?: string;
}

export type Report = (finding: Finding) => void;

/** More than anyone reads; keeps a hostile file from filling memory. */
const MOST = 1000;

const byPlace = (a: Diagnostic, b: Diagnostic): number =>
  Number(a.at.file > b.at.file) - Number(a.at.file < b.at.file) ||
  a.at.line - b.at.line ||
  a.at.column - b.at.column ||
  Number(a.code > b.code) - Number(a.code < b.code);

export interface Findings {
  readonly report: Report;
  /** Takes over what another collection found. */
  readonly include: (diagnostics: readonly Diagnostic[]) => void;
  /** Everything reported, sorted by place, each finding once. */
  readonly sorted: () => readonly Diagnostic[];
  readonly anyError: () => boolean;
}

const identity = (d: Diagnostic): string => `${d.code} ${d.at.file}:${d.at.line}:${d.at.column} ${d.message}`;

export function collectFindings(): Findings {
  const found = new Map<string, Diagnostic>();
  const keep = (diagnostic: Diagnostic): void => {
    if (found.size < MOST) found.set(identity(diagnostic), diagnostic);
  };
  const errors = (): readonly Diagnostic[] =>
    [...found.values()].filter(({ severity }) => severity === "error");
  return {
    report: ({ fix = "", ...finding }) =>
      keep({ ...finding, severity: CATALOGUE[finding.code].severity, ...(fix === "" ? {} : { fix }) }),
    include: (diagnostics) => diagnostics.forEach(keep),
    sorted: () => [...found.values()].sort(byPlace),
    anyError: () => errors().length > 0,
  };
}
