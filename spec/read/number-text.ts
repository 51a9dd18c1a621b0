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

/** `165 000 rpm`: the second group would pass for a unit. */
export const isGrouped = (text: string): boolean => GROUPED.test(text);

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

interface Plain {
  readonly quoted: boolean;
  readonly at: Span;
}

/** Traps of numbers without a unit: in quotes, or in a form that YAML 1.1 programs take for text. */
export function checkPlain(number: string, { quoted, at }: Plain, place: Place, context: Context): void {
  if (quoted)
    context.report({
      code: "number-as-text",
      at,
      message: `${place.name} is a plain number, but \`"${number}"\` is text`,
      label: "remove the quotes",
      fix: place.fix.replace(place.example, number),
    });
  else if (/^[+-]?\d+[eE]/.test(number) || /[eE]\d/.test(number))
    context.report({
      code: "exponent-without-point",
      at,
      message: `${quote(number)} is a number here, but text to programs that read YAML 1.1`,
      label: "write the digits, or a point and a sign in the exponent",
      fix: place.fix.replace(place.example, plainDigits(number)),
    });
}

/** The number without an exponent where that is short, else with a point and a sign. */
function plainDigits(number: string): string {
  const digits = String(Number(number));
  return digits.includes("e") ? digits.replace(/^(-?\d+)e/, "$1.0e") : digits;
}
