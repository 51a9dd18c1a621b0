import { type Picture, pictureMarkup } from "./charts/picture.ts";
import { type Html, type HtmlPart, html, trusted } from "./html.ts";

export interface ValueTable {
  readonly caption: string;
  readonly head: readonly string[];
  /** The first cell of a row names it. */
  readonly rows: readonly (readonly HtmlPart[])[];
}

function row([first, ...rest]: readonly HtmlPart[]): Html {
  return html`<tr><th scope="row">${first}</th>${rest.map(
    (cell) => html`
<td>${cell}</td>`,
  )}</tr>
`;
}

/**
 * A table in a box that scrolls by itself, reachable by keyboard. The caption is shown outside the box, where it can
 * wrap; the table keeps its own for readers that hear it.
 */
export function tableBox(table: ValueTable, className: string): Html {
  return html`<p class="caption" aria-hidden="true">${table.caption}</p>
<div class="box" role="group" tabindex="0" aria-label="${table.caption}">
<table class="${className}"><caption>${table.caption}</caption>
<thead><tr>${table.head.map(
    (words) => html`<th scope="col">${words}</th>
`,
  )}</tr></thead>
<tbody>${table.rows.map(row)}</tbody></table></div>`;
}

/** A picture with its caption and the same values as a table. */
export function figureBox(picture: Picture, caption: HtmlPart, table: ValueTable): Html {
  return html`<figure id="${picture.id}-figure">
<div class="box" role="group" tabindex="0" aria-label="${picture.title}">${trusted(pictureMarkup(picture))}</div>
<figcaption>${caption}</figcaption>
<details><summary>Values as a table</summary>${tableBox(table, "values")}</details>
</figure>`;
}
