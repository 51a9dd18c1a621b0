import type { Report } from "../diagnostics/report.ts";
import type { Span } from "../span.ts";

/** A word elsewhere in the file that decides units here. */
export interface Chosen {
  readonly word: string;
  readonly at: Span;
}

export interface Context {
  readonly report: Report;
  readonly choices: { readonly coordinate?: Chosen; readonly schedule?: Chosen };
}

/** What is being read, for messages. */
export interface Place {
  /** Key as written, or `item 3 of friction`. */
  readonly name: string;
  readonly example: string;
  /** A line that can be pasted: `step: 5 ms`. */
  readonly fix: string;
}

export const placeOfKey = (name: string, example: string): Place => ({
  name: `\`${name}\``,
  example,
  fix: `${name}: ${example}`,
});
