import type { Span } from "../span.ts";
import type { Context, Place } from "./context.ts";
import { quote } from "./suggest.ts";

const DECIMAL = /^[+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d{1,4})?$/;
const LONGEST_NUMBER = 40;

/** A decimal of reasonable length whose double is finite. */
export const isDecimal = (text: string): boolean =>
  text.length <= LONGEST_NUMBER && DECIMAL.test(text) && Number.isFinite(Number(text));

const NOT_FINITE = /^[+-]?\.?(inf|infinity|nan)\b/i;
const BOOLEAN_WORD = /^(y|n|yes|no|on|off|true|false)$/i;
const GROUPED = /^[+-]?\d{1,3}([,_' ]\d{3})+/;
const DECIMAL_COMMA = /^[+-]?\d+,\d+/;

/** Reports why a text is not a number; the traps have their own codes. */
export function refuseNumber(text: string, at: Span, expected: string, place: Place, context: Context): void {
  const finding = { at, fix: place.fix };
  const say = `${place.name} needs ${expected}`;
  if (text === "" || text === "null" || text === "~")
    context.report({
      ...finding,
      code: "missing-value",
      message: `${say}, got nothing`,
      label: `expected ${expected}`,
    });
  else if (BOOLEAN_WORD.test(text))
    context.report({
      ...finding,
      code: "boolean-word",
      message: `${say}, got the word ${quote(text)}`,
      label: "other YAML programs read this word as true or false",
    });
  else if (NOT_FINITE.test(text) || isHuge(text))
    context.report({
      ...finding,
      code: "not-finite",
      message: `${say}, got ${quote(text)}`,
      label: "expected a finite number",
    });
  else if (GROUPED.test(text) || DECIMAL_COMMA.test(text))
    context.report({
      ...finding,
      code: "number-format",
      message: `${say}, got ${quote(text)}`,
      label: "write digits without grouping and a point for decimals",
    });
  else
    context.report({
      ...finding,
      code: "not-a-number",
      message: `${say}, got ${quote(text)}`,
      label: `expected a number, for example ${place.example}`,
    });
}

const isHuge = (text: string): boolean => {
  const [number = ""] = /^[+-]?[\d.]+([eE][+-]?\d+)?/.exec(text) ?? [];
  return (
    number !== "" &&
    (number.length > LONGEST_NUMBER || !Number.isFinite(Number(number)) || /[eE][+-]?\d{5,}/.test(number))
  );
};
