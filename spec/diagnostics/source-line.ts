import type { Span } from "../span.ts";

const INDENT = "      ";
const CUT = "...";

/** Control characters from a stranger's file must not reach a terminal. */
export const visible = (text: string): string =>
  text.replace(/[\p{Cc}\p{Cf}]/gu, (found) => (found === "\t" ? " " : "\ufffd"));

/** The line that a span starts on, without its indentation, and how far the caret stands from the left edge. */
export function sourceLine(
  lines: readonly string[],
  at: Span,
  width: number,
): { text: string; caret: number } {
  const line = visible((lines[at.line - 1] ?? "").replace(/\r$/, ""));
  const indent = line.length - line.trimStart().length;
  const column = Math.max(at.column - 1 - indent, 0);
  const room = Math.max(width - INDENT.length, 20);
  const text = line.slice(indent).trimEnd();
  if (text.length <= room) return { text: `${INDENT}${text}`, caret: INDENT.length + column };
  return cutAround(text, column, room);
}

/** A long line loses what is far from the caret. */
function cutAround(text: string, column: number, room: number): { text: string; caret: number } {
  const start =
    column < room - CUT.length - 8
      ? 0
      : Math.min(column - Math.floor(room / 2), text.length - room + CUT.length);
  const before = start > 0 ? CUT : "";
  const kept = text.slice(start, start + room - before.length);
  const after = start + kept.length < text.length ? CUT : "";
  const shown = after === "" ? kept : kept.slice(0, kept.length - CUT.length);
  return {
    text: `${INDENT}${before}${shown}${after}`,
    caret: INDENT.length + before.length + column - start,
  };
}
