import { type PlotOptions, plot } from "@observablehq/plot";
import { parseHTML } from "linkedom";

/** The little of a drawn element that is used here. */
interface DrawnElement {
  readonly outerHTML: string;
  setAttribute(name: string, value: string): void;
  removeAttribute(name: string): void;
  remove(): void;
  querySelectorAll(selector: string): Iterable<DrawnElement>;
}

/** Hundredths of a pixel: no eye sees more, and the last bits of a library's logarithms stay out of the bytes. */
function roundDecimals(value: string): string {
  return value.replace(/-?\d+\.\d{3,}(?:e-?\d+)?/g, (number) => String(Number(Number(number).toFixed(2))));
}

/** The library numbers its clip paths through the life of the process; here they count from 1 in each chart. */
function renumber(value: string, ids: Map<string, string>, prefix: string): string {
  return value.replace(/plot-clip-\d+/g, (id) => {
    if (!ids.has(id)) ids.set(id, `${prefix}-clip-${ids.size + 1}`);
    return ids.get(id) as string;
  });
}

/**
 * The library names the parts of a chart by `aria-label`, which is not allowed on a plain group; the picture as a whole
 * has its title, and the names stay as data for the script. Serialised text holds no bare `<` or `>`, so that only
 * tags are touched.
 */
function tidy(markup: string, prefix: string): string {
  const ids = new Map<string, string>();
  const tidyAttribute = (whole: string, name: string, value: string): string => {
    if (name === "aria-label") return `data-part="${value}"`;
    if (name.startsWith("data-")) return whole;
    return `${name}="${renumber(roundDecimals(value), ids, prefix)}"`;
  };
  return markup.replace(/<[^>]*>/g, (tag) => tag.replace(/([\w-]+)="([^"]*)"/g, tidyAttribute));
}

/** `data-` attributes of a chart, for the script. */
export type ChartData = Readonly<Record<string, string | number>>;

/**
 * One chart as the text of an `svg` element. `prefix` makes ids unique on the page; `y` places the chart below
 * others in an outer `svg`.
 */
export function drawChart(options: PlotOptions, prefix: string, y = 0, data: ChartData = {}): string {
  const { document } = parseHTML("<!doctype html><html><body></body></html>");
  const svg = plot({ ...options, document, className: "chart" }) as unknown as DrawnElement;
  for (const style of svg.querySelectorAll("style")) style.remove();
  for (const attribute of ["font-family", "font-size", "class", "fill"]) svg.removeAttribute(attribute);
  svg.setAttribute("y", String(y));
  for (const [name, value] of Object.entries(data)) svg.setAttribute(`data-${name}`, String(value));
  return tidy(svg.outerHTML, prefix);
}
