import type { YAMLError } from "yaml";
import type { Finding } from "../diagnostics/report.ts";
import type { Positions } from "./positions.ts";

const RESERVED = /reserved character|directive indicator/;

/** A finding of the YAML parser in our words: the traps that have a name get their own code. */
export function yamlFinding(error: YAMLError, text: string, positions: Positions): Finding {
  const [start, end] = error.pos;
  const at = positions.span(start, Math.max(end, start + 1));
  const character = text[start] ?? "";
  if (error.code === "TAB_AS_INDENT")
    return {
      code: "tab-indentation",
      at,
      message: "a tab indents this line; YAML allows only spaces",
      fix: "replace the tab by two spaces",
    };
  if (error.code === "BAD_SCALAR_START" && character === "%")
    return {
      code: "unquoted-percent",
      at,
      message: "an unquoted value cannot start with `%`",
      label: 'write "%"',
      fix: 'unit: "%"',
    };
  if (RESERVED.test(error.message))
    return {
      code: "bad-yaml",
      at,
      message: `an unquoted value cannot start with \`${character}\``,
      fix: "put the value in double quotes",
    };
  return { code: "bad-yaml", at, message: lowerFirst(error.message) };
}

const lowerFirst = (text: string): string => text.charAt(0).toLowerCase() + text.slice(1);
