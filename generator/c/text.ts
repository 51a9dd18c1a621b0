import type { Program } from "../ir/program.ts";
import { commentLines, commentText } from "../print/comment-text.ts";

/** A numbered section's heading; an empty section is left out, the numbers stay. */
export const section = (title: string, body: readonly string[]): readonly string[] =>
  body.length === 0 ? [] : ["", `/* ---- ${title} ${"-".repeat(Math.max(3, 92 - title.length))} */`, ...body];

/** The head of a file: what it is, where it comes from, what is in it. No date, user, path or tool version. */
export const banner = (
  program: Program,
  file: string,
  what: string,
  more: readonly string[],
): readonly string[] => {
  const sentences = [
    `${file} - ${what}`,
    commentText(program.description),
    `Generated from ${commentText(program.source)}, meaning ${program.meaning}. Edit that file instead of this one.`,
    ...more,
  ];
  const lines = sentences.flatMap((sentence) => commentLines([sentence], 104));
  return [...lines.map((line, i) => `${i === 0 ? "/*" : " *"} ${line}`.trimEnd()), " */"];
};
