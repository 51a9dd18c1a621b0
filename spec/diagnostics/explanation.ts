import type { Severity } from "../diagnostic.ts";

/** What `explain` says about a code. */
export interface Explanation {
  readonly severity: Severity;
  /** Why the reader objects. */
  readonly cause: string;
  /** Lines that bring it about. */
  readonly example: string;
  /** What to write. */
  readonly fix: string;
}
