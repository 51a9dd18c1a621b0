import type { Span } from "../span.ts";

const INDENT = "      ";
const CUT = "...";
/** Characters looked at on both sides of the place: a line of megabytes costs no more than this. */
const NEAR = 1000;

/** Control characters from a stranger's file must not reach a terminal. */
export const visible = (text: string): string =>
  text.replace(/[\p{Cc}\p{Cf}]/gu, (found) => (found === "\t" ? " " : "\ufffd"));

export interface ShownLine {
  readonly text: string;
  /** Where the caret stands under the text. */
  readonly caret: number;
}

/** The line that a span starts on, without its indentation, cut to the width around the span. */
export function sourceLine(lines: readonly string[], at: Span, width: number): ShownLine {
  const whole = lines[at.line - 1] ?? "";
  const from = Math.max(at.column - 1 - NEAR, 0);
  const line = visible(whole.slice(from, from + 2 * NEAR).replace(/\r$/, ""));
  const text = line.trimStart();
  const column = Math.max(at.column - 1 - from - (line.length - text.length), 0);
  const room = Math.max(width - INDENT.length, 20);
  if (from === 0 && text.trimEnd().length <= room)
    return { text: `${INDENT}${text.trimEnd()}`, caret: INDENT.length + column };
  return cutAround(text.trimEnd(), column, room);
}

/** A long line loses what is far from the caret. */
function cutAround(text: string, column: number, room: number): ShownLine {
  const atStart = column < room - CUT.length - 8;
  const latest = text.length - room + CUT.length;
  const start = atStart ? 0 : Math.max(Math.min(column - Math.floor(room / 2), latest), 0);
  const before = start > 0 ? CUT : "";
  const kept = text.slice(start, start + room - before.length);
  const isCut = start + kept.length < text.length;
  const shown = isCut ? `${kept.slice(0, kept.length - CUT.length)}${CUT}` : kept;
  return { text: `${INDENT}${before}${shown}`, caret: INDENT.length + before.length + column - start };
}
