import type { TextKind } from "../table/kind.ts";
import { isEmpty, type Node } from "../text/node.ts";
import type { Context, Place } from "./context.ts";
import { refuseShape } from "./refuse-shape.ts";
import { nearestName, orList, quote } from "./suggest.ts";

const IDENTIFIER = /^[a-z][a-z0-9_]{0,39}$/;
const LONGEST_SENTENCE = 400;
/** Control characters other than line breaks and tabs, and direction marks that could disguise text. */
const HIDDEN = /(?![\n\r\t])[\p{Cc}\p{Cf}]/u;

/** Words that C99 or TypeScript keep for themselves, so that generated names stay valid. */
const KEPT_WORDS = new Set(
  `auto break case char const continue default do double else enum extern float for goto if inline int long
  register restrict return short signed sizeof static struct switch typedef union unsigned void volatile while
  bool true false null undefined class export import function let new this var with yield await async main`.split(
    /\s+/,
  ),
);

export const isIdentifier = (text: string): boolean => IDENTIFIER.test(text) && !KEPT_WORDS.has(text);

export function readText(node: Node, kind: TextKind, place: Place, context: Context): string | undefined {
  const expected = kind.form === "identifier" ? "a name" : kind.form === "path" ? "a path" : "a sentence";
  if (node.kind !== "scalar" || (isEmpty(node) && !node.quoted))
    return refuseShape(node, expected, place, context);
  if (kind.form === "identifier" && !isIdentifier(node.text)) {
    context.report({
      code: "bad-name",
      at: node.at,
      message: `${quote(node.text)} cannot be a name`,
      label: "a small letter, then small letters, digits or _, 40 at most, no word of C or TypeScript",
      fix: place.fix,
    });
    return undefined;
  }
  if (node.text.length <= LONGEST_SENTENCE && !HIDDEN.test(node.text)) return node.text.trim();
  context.report({
    code: "bad-text",
    at: node.at,
    message: HIDDEN.test(node.text)
      ? `${place.name} has a hidden control character`
      : `${place.name} is longer than ${LONGEST_SENTENCE} characters`,
    fix: place.fix,
  });
  return undefined;
}

const BOOLEAN_WORD = /^(y|n|yes|no|on|off|true|false)$/i;

export function readWord(
  node: Node,
  all: readonly string[],
  place: Place,
  context: Context,
): string | undefined {
  if (node.kind !== "scalar" || isEmpty(node))
    return refuseShape(node, `one of ${orList(all)}`, place, context);
  if (all.includes(node.text)) return node.text;
  const near = nearestName(node.text, all);
  const trap = !node.quoted && BOOLEAN_WORD.test(node.text);
  context.report({
    code: trap ? "boolean-word" : "unknown-word",
    at: node.at,
    message: `${place.name} cannot be ${quote(node.text)}`,
    label: near === undefined || trap ? `expected ${orList(all)}` : `did you mean \`${near}\`?`,
    fix: near === undefined || trap ? place.fix : place.fix.replace(place.example, near),
  });
  return undefined;
}

export function readFlag(node: Node, place: Place, context: Context): boolean | undefined {
  const word = readWord(node, ["true", "false"], place, context);
  return word === undefined ? undefined : word === "true";
}
