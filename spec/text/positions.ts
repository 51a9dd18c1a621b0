import type { Span } from "../span.ts";

/** Turns offsets into spans of one file. */
export interface Positions {
  readonly span: (start: number, end: number) => Span;
}

function lineStarts(text: string): number[] {
  const starts = [0];
  for (let at = text.indexOf("\n"); at !== -1; at = text.indexOf("\n", at + 1)) starts.push(at + 1);
  return starts;
}

/** Index of the last start that is not after `offset`. */
function lineOf(starts: readonly number[], offset: number): number {
  let [low, high] = [0, starts.length - 1];
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (starts[middle] <= offset) low = middle;
    else high = middle - 1;
  }
  return low;
}

export function positionsOf(file: string, text: string): Positions {
  const starts = lineStarts(text);
  const limit = (offset: number): number => Math.min(Math.max(offset, 0), text.length);
  return {
    span(from, to) {
      const start = limit(from);
      const end = Math.max(limit(to), start);
      const [line, endLine] = [lineOf(starts, start), lineOf(starts, end)];
      return {
        file,
        line: line + 1,
        column: start - starts[line] + 1,
        endLine: endLine + 1,
        endColumn: end - starts[endLine] + 1,
      };
    },
  };
}

/** A block is shown where it starts, not over all its lines. */
export const startOf = (at: Span): Span => ({ ...at, endLine: at.line, endColumn: at.column + 1 });

/** A stretch of a one-line span: `length` characters from `offset`; the whole span when it has several lines. */
export function within(span: Span, offset: number, length: number): Span {
  if (span.line !== span.endLine) return span;
  const column = span.column + offset;
  const endColumn = Math.min(column + Math.max(length, 1), span.endColumn);
  return column >= span.endColumn ? span : { ...span, column, endColumn };
}
