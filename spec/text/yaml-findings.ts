import type { YAMLError } from "yaml";
import type { Finding } from "../diagnostics/report.ts";
import type { Positions } from "./positions.ts";

type Words = Pick<Finding, "code" | "message" | "label" | "fix">;

/** A finding of the YAML parser in our words: the traps that have a name get their own code. */
export function yamlFinding(error: YAMLError, text: string, positions: Positions): Finding {
  const [start, end] = error.pos;
  const at = positions.span(start, Math.max(end, start + 1));
  return { at, ...wordsFor(error, text[start] ?? "") };
}

function wordsFor(error: YAMLError, character: string): Words {
  if (error.code === "TAB_AS_INDENT") return TAB;
  if (error.code !== "BAD_SCALAR_START")
    return { code: "bad-yaml", message: MESSAGES[error.code] ?? lowerFirst(error.message) };
  if (character === "%") return PERCENT;
  return {
    code: "bad-yaml",
    message: `an unquoted value cannot start with \`${character}\``,
    fix: "put the value in double quotes",
  };
}

const TAB: Words = {
  code: "tab-indentation",
  message: "a tab indents this line; YAML allows only spaces",
  fix: "replace the tab by two spaces",
};
const PERCENT: Words = {
  code: "unquoted-percent",
  message: "an unquoted value cannot start with `%`",
  label: 'write "%"',
  fix: 'unit: "%"',
};

const MESSAGES: Readonly<Partial<Record<YAMLError["code"], string>>> = {
  BAD_INDENT: "this line does not fit the lines above: a bracket is open, or the indentation is wrong",
  MISSING_CHAR: "a closing quote, a bracket or a comma is missing",
  BLOCK_AS_IMPLICIT_KEY: "a second `:` in one value: the line is indented too far, or a quote is missing",
  MULTILINE_IMPLICIT_KEY: "a key must stand on one line with its `:`",
  UNEXPECTED_TOKEN: "this text does not belong here: a bracket, a comma or a quote is missing before it",
};

const lowerFirst = (text: string): string => text.charAt(0).toLowerCase() + text.slice(1);
