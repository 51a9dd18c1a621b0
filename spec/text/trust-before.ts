import { QUANTITY_CODES } from "../diagnostics/catalogue/quantities.ts";
import type { CATALOGUE } from "../diagnostics/catalogue.ts";
import type { Report } from "../diagnostics/report.ts";
import type { Span } from "../span.ts";

/** Findings about a single value: still true when YAML lost its way further down. */
const ABOUT_ONE_VALUE = new Set<keyof typeof CATALOGUE>([
  ...(Object.keys(QUANTITY_CODES) as (keyof typeof QUANTITY_CODES)[]),
  "bad-name",
  "bad-text",
  "boolean-word",
  "not-increasing",
  "unknown-word",
]);

/** Passes on only what is certain in a file whose YAML is broken from some place on. */
export function trustBefore(broken: Span | undefined, report: Report): Report {
  if (broken === undefined) return report;
  return (finding) => {
    const before =
      finding.at.line < broken.line || (finding.at.line === broken.line && finding.at.column < broken.column);
    if (before && ABOUT_ONE_VALUE.has(finding.code)) report(finding);
  };
}
