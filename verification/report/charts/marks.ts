import { line, type Markish, text } from "@observablehq/plot";
import { LINE_STYLES, type LineRole, type LineStyle } from "./line-style.ts";
import { colour } from "./palette.ts";
import type { Sample } from "./thin-out.ts";

/** Margins of every chart with a time axis: the same, so that times stand below each other. */
export const FRAME = { width: 760, left: 72, right: 14, top: 24 } as const;
export const PLOT_WIDTH = FRAME.width - FRAME.left - FRAME.right;

/** Width of a label at 11 px, on the generous side; no font is at hand to measure. */
const CHARACTER_WIDTH = 6.2;

export function strokeOf(role: LineRole): Record<string, string | number> {
  const style: LineStyle = LINE_STYLES[role];
  const dash = style.dash === undefined ? {} : { strokeDasharray: style.dash };
  return { stroke: colour(style.colour), strokeWidth: style.width, ...dash };
}

export function seriesMark(samples: readonly Sample[], role: LineRole): Markish {
  return line(samples, { x: "x", y: "y", clip: true, ...strokeOf(role) });
}

export interface Scales {
  readonly x: readonly [number, number];
  readonly y: readonly [number, number];
  readonly plotWidth: number;
  readonly plotHeight: number;
}

/** Scale values of a pixel position, counted from the left and upwards from the top edge of the plot area. */
function atPixel(scales: Scales, right: number, above: number): Sample {
  const { x, y, plotWidth, plotHeight } = scales;
  return {
    x: x[0] + (right / plotWidth) * (x[1] - x[0]),
    y: y[1] + (above / plotHeight) * (y[1] - y[0]),
  };
}

/** The line above a chart: what it shows, then each line's name beside a piece of it. */
export function legendMarks(
  scales: Scales,
  title: string,
  entries: readonly { readonly role: LineRole; readonly name: string }[],
): Markish[] {
  const write = (words: string, right: number, weight: number): Markish =>
    text([atPixel(scales, right, 11)], {
      x: "x",
      y: "y",
      text: [words],
      textAnchor: "start",
      fill: colour("ink"),
      fontWeight: weight,
    });
  const marks = [write(title, 0, 600)];
  let right = title.length * CHARACTER_WIDTH + 26;
  for (const { role, name } of entries) {
    const sample = [atPixel(scales, right, 11), atPixel(scales, right + 26, 11)];
    marks.push(line(sample, { x: "x", y: "y", ...strokeOf(role) }), write(name, right + 31, 400));
    right += 31 + name.length * CHARACTER_WIDTH + 18;
  }
  return marks;
}
