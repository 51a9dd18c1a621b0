/** Known to this file alone: no object read from a JSON file can carry it and pass for markup. */
const MADE_HERE = Symbol("made here");

/** Text that is already markup; anything else that reaches `html` is escaped. */
export interface Html {
  readonly [MADE_HERE]: true;
  readonly markup: string;
}

export type HtmlPart = Html | string | number | undefined | readonly HtmlPart[];

const ENTITIES: Readonly<Record<string, string>> = {
  "&": "&amp;",
  "<": "&lt;",
  ">": "&gt;",
  '"': "&quot;",
  "'": "&#39;",
};

/** Characters that no markup may hold: controls other than tab and line feed, lone surrogates, non-characters. */
const FORBIDDEN = /[\p{Cc}\p{Surrogate}\p{Noncharacter_Code_Point}]/gu;

function replaceForbidden(character: string): string {
  return character === "\t" || character === "\n" ? character : "\uFFFD";
}

/** A stranger's text, safe inside an element or a quoted attribute. */
export function escapeText(text: string): string {
  return text.replace(FORBIDDEN, replaceForbidden).replace(/[&<>"']/g, (character) => ENTITIES[character]);
}

function isHtml(part: HtmlPart): part is Html {
  return typeof part === "object" && MADE_HERE in part;
}

function render(part: HtmlPart): string {
  if (part === undefined) return "";
  if (typeof part === "string") return escapeText(part);
  if (typeof part === "number") return String(part);
  return isHtml(part) ? part.markup : part.map(render).join("");
}

/** Markup with every inserted string escaped; lists are joined, `undefined` leaves nothing. */
export function html(strings: TemplateStringsArray, ...parts: readonly HtmlPart[]): Html {
  const markup = strings.reduce((text, string, i) => text + render(parts[i - 1]) + string);
  return trusted(markup);
}

/** Markup made by this project (a chart, a style sheet), taken as it is. */
export function trusted(markup: string): Html {
  return { [MADE_HERE]: true, markup };
}

/**
 * A name from a spec: kept apart from the direction of the text around it, so that a right-to-left name cannot
 * reorder the sentence it stands in.
 */
export function name(text: string): Html {
  return html`<bdi>${text}</bdi>`;
}

export function code(text: string): Html {
  return html`<code><bdi>${text}</bdi></code>`;
}
