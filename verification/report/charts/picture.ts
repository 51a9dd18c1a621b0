import { escapeText } from "../html.ts";
import { colour, withFixedColours } from "./palette.ts";

/** Charts stacked in one frame: what a figure shows. */
export interface Picture {
  /** Unique on the page; letters, digits and hyphens. */
  readonly id: string;
  readonly title: string;
  readonly description: string;
  readonly width: number;
  readonly height: number;
  /** `svg` elements placed by their `y`. */
  readonly charts: readonly string[];
  /** Extra attributes of the outer element, for the script. */
  readonly data?: Readonly<Record<string, string | number>>;
}

function attributes(data: Readonly<Record<string, string | number>> = {}): string {
  return Object.entries(data)
    .map(([name, value]) => ` data-${name}="${escapeText(String(value))}"`)
    .join("");
}

/** The picture as an `svg` element for a page that defines the colours. */
export function pictureMarkup(picture: Picture): string {
  const { id, width, height } = picture;
  return [
    `<svg xmlns="http://www.w3.org/2000/svg" class="picture" role="img" aria-labelledby="${id}-title ${id}-text"`,
    ` viewBox="0 0 ${width} ${height}" width="${width}" height="${height}" font-size="11"`,
    ` style="min-width:${Math.round(width * 0.76)}px;max-width:${Math.round(width * 1.15)}px"`,
    ` font-family="system-ui, sans-serif" fill="${colour("ink")}" color="${colour("ink")}"`,
    `${attributes(picture.data)}>`,
    `<title id="${id}-title">${escapeText(picture.title)}</title>`,
    `<desc id="${id}-text">${escapeText(picture.description)}</desc>`,
    ...picture.charts,
    "</svg>",
  ].join("");
}

/** The picture as a file of its own: fixed light colours on white. */
export function pictureFile(picture: Picture): string {
  const markup = withFixedColours(pictureMarkup(picture));
  const paper = `<rect width="100%" height="100%" fill="#ffffff"/>`;
  return `<?xml version="1.0" encoding="UTF-8"?>\n${markup.replace("</desc>", `</desc>${paper}`)}\n`;
}
