import { pictureFile } from "./charts/picture.ts";
import { tracePicture } from "./charts/trace-picture.ts";
import type { TracePlot } from "./charts/trace-plot.ts";
import { figureBox } from "./figure.ts";
import { html, name } from "./html.ts";
import { page } from "./page.ts";
import { traceTable } from "./trace-table.ts";

/** One run over time as an SVG file of its own, in light colours. */
export function renderTraceSvg(trace: TracePlot): string {
  return pictureFile(tracePicture(trace));
}

/** One run over time as a self-contained page; `notes` are sentences to stand above the charts. */
export function renderTraceHtml(trace: TracePlot, notes: readonly string[] = []): string {
  const caption = "One run over time. Peaks are kept where samples are thinned out.";
  const body = html`<header><h1>${name(trace.title)}</h1>${notes.map((note) => html`<p>${name(note)}</p>`)}</header>
<main>${figureBox(tracePicture(trace), caption, traceTable(trace))}</main>`;
  return page(trace.title, body);
}
