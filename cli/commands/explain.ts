import { closest } from "fastest-levenshtein";
import { CATALOGUE, type Explanation, explain as explainSpec } from "../../spec/index.ts";
import { CommandFailure } from "../command-failure.ts";
import { EXIT, type ExitCode } from "../exit-codes.ts";
import { FILE_CODES } from "../file-findings.ts";
import { jsonText } from "../findings.ts";
import type { Session } from "../session.ts";

const indented = (text: string): string => text.replace(/^/gm, "  ");

const explanationText = (code: string, { severity, cause, example, fix }: Explanation): string =>
  [`${code} (${severity})`, "", cause, "", "example:", indented(example), "", "fix:", indented(fix)].join(
    "\n",
  );

const explanationOf = (code: string): Explanation | undefined =>
  explainSpec(code) ?? (Object.hasOwn(FILE_CODES, code) ? FILE_CODES[code] : undefined);

/** `explain CODE`: cause, example and fix of a diagnostic. */
export function explain(code: string, session: Session): ExitCode {
  const explanation = explanationOf(code);
  if (explanation === undefined) {
    const known = [...Object.keys(CATALOGUE), ...Object.keys(FILE_CODES)];
    throw new CommandFailure(`there is no diagnostic \`${code}\`; did you mean \`${closest(code, known)}\`?`);
  }
  session.result(session.json ? jsonText({ code, ...explanation }) : explanationText(code, explanation));
  return EXIT.fine;
}
