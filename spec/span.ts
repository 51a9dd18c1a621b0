/** A stretch of a file: where a diagnostic points and where a value came from. Lines and columns start at 1. */
export interface Span {
  readonly file: string;
  readonly line: number;
  readonly column: number;
  readonly endLine: number;
  /** One past the last column. */
  readonly endColumn: number;
}
