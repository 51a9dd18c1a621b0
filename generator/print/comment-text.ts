import { snakeCase } from "./identifiers.ts";

const LONGEST_COMMENT = 400;

const PLAIN: Readonly<Record<string, string>> = {
  "\u00b0": "deg ",
  "\u00b1": "+-",
  "\u00b2": "2",
  "\u00b3": "3",
  "\u00b5": "u",
  "\u00b7": "*",
  "\u00d7": "x",
  "\u2013": "-",
  "\u2014": "-",
  "\u2018": "'",
  "\u2019": "'",
  "\u201c": '"',
  "\u201d": '"',
  "\u2212": "-",
  "\u2264": "<=",
  "\u2265": ">=",
};

/**
 * Text on its way into a comment of generated code, made harmless: it cannot end the comment or open another, form a
 * trigraph, continue a line, or carry anything but printable ASCII. Very long text is cut.
 */
export const commentText = (text: string): string => {
  const ascii = [...text].map(
    (each) => PLAIN[each] ?? (/[\x20-\x7e]/.test(each) ? each : /\s/.test(each) ? " " : "?"),
  );
  const harmless = ascii
    .join("")
    .replace(/\?(?=\?)/g, "? ")
    .replace(/\*(?=\/)/g, "* ")
    .replace(/\/(?=[*/])/g, "/ ")
    .replace(/\\/g, "/")
    .replace(/\/(?=[*/])/g, "/ ")
    .replace(/\*(?=\/)/g, "* ")
    .trimEnd();
  return harmless.length > LONGEST_COMMENT ? `${harmless.slice(0, LONGEST_COMMENT - 3)}...` : harmless;
};

const indentOf = (text: string): number => text.length - text.trimStart().length;

/** Source lines are about 118 wide: an indented line that long was broken there, a shorter one ended. */
const BROKEN_LINE = 95;

const runsOn = (before: string, text: string): boolean => {
  const isProse = /^\S/.test(before) && /^[^\s-]/.test(text) && !/[.:]$/.test(before);
  return (
    isProse || (before.length >= BROKEN_LINE && indentOf(before) === indentOf(text) && indentOf(text) > 0)
  );
};

/** Lines of running text joined into paragraphs; indented lines (equations) and those after an empty one stand alone. */
const paragraphs = (texts: readonly string[]): readonly string[] => {
  const joined: string[] = [];
  for (const text of texts) {
    const before = joined[joined.length - 1];
    if (before !== undefined && runsOn(before, text)) {
      joined[joined.length - 1] = `${before} ${text.trim()}`;
    } else {
      joined.push(text);
    }
  }
  return joined;
};

/** Harmless text in lines of at most `width`; the indent of an equation is kept on its further lines. */
export const commentLines = (texts: readonly string[], width: number): readonly string[] =>
  paragraphs(texts).flatMap((text) => {
    const clean = commentText(text);
    const indent = /^ */.exec(clean)?.[0] ?? "";
    const lines: string[] = [];
    let line = "";
    for (const word of clean.trim().split(/ (?=\S)/)) {
      if (line !== "" && indent.length + line.length + 1 + word.length > width) {
        lines.push(indent + line);
        line = word;
      } else {
        line = line === "" ? word : `${line} ${word}`;
      }
    }
    return [...lines, (indent + line).trimEnd()];
  });

/** Names of the runtime in backquotes, as they are printed. */
const printedNames = (text: string): string =>
  text.replace(/`([a-z][A-Za-z0-9]*)`/g, (_, name: string) => `\`${snakeCase(name)}\``);

/** A block comment on as many lines as it needs, indented as the code it stands above. */
export const blockComment = (texts: readonly string[], indent: string): readonly string[] => {
  const lines = commentLines(texts.map(printedNames), 104 - indent.length);
  if (lines.length === 0) {
    return [];
  }
  return lines.length === 1
    ? [`${indent}/* ${lines[0]} */`]
    : [...lines.map((line, i) => `${indent}${i === 0 ? "/*" : " *"} ${line}`.trimEnd()), `${indent} */`];
};
