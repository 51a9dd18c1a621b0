import type { CompressorMap, Evidence, MapPoint, WorstTrace } from "../../evidence.ts";
import { compressorMapPicture } from "../charts/compressor-map-picture.ts";
import { tracePicture } from "../charts/trace-picture.ts";
import type { TracePlot } from "../charts/trace-plot.ts";
import { figureBox, type ValueTable } from "../figure.ts";
import { type Html, html, name } from "../html.ts";
import { decimals, margin, whole } from "../numbers.ts";
import { slug } from "../slug.ts";
import { spreadIndices, traceTable } from "../trace-table.ts";

/** Labels along the way through the map. */
const TIMES = 9;
const TABLE_TIMES = 25;

function titled(trace: WorstTrace): string {
  return `${trace.kind === "corner" ? "Corner" : "Random"} run ${trace.run} of ${trace.scenario}`;
}

function plotOf(evidence: Evidence, trace: WorstTrace, index: number): TracePlot {
  const lengths = Object.values(trace.signals).map((values) => values.length);
  return {
    id: slug("trace", index),
    title: titled(trace),
    stepS: trace.stepS,
    length: Math.max(trace.mode.length, ...lengths),
    signals: trace.signals,
    ...(trace.mode.length === 0 ? {} : { mode: trace.mode }),
    limits: evidence.controller.limits,
  };
}

/** Requirements that have this run as their worst. */
function reasons(evidence: Evidence, index: number): Html {
  const found = evidence.requirements.flatMap((result, i) =>
    [result.worst, result.corners.worst].flatMap((worst, corner) =>
      worst?.trace !== index
        ? []
        : [
            html`<li><a href="#${slug("requirement", i)}">${name(result.id)}</a>, ${
              corner === 0 ? "worst random run" : "worst corner run"
            }: margin ${margin(worst.margin)}</li>`,
          ],
    ),
  );
  return html`<ul>${found}</ul>`;
}

function points(trace: WorstTrace): MapPoint[] {
  const { correctedFlowKgS, pressureRatio } = trace.operating;
  return correctedFlowKgS.map((flow, i) => [flow, pressureRatio[i] ?? Number.NaN] as const);
}

function onTheMap(map: CompressorMap, trace: WorstTrace, index: number): Html | undefined {
  const path = points(trace);
  if (path.length === 0) return undefined;
  const title = `${titled(trace)} on the compressor map`;
  const time = (i: number, places: number): string => decimals(i * trace.stepS, places);
  const labels = spreadIndices(path.length, TIMES).map((i) => ({ index: i, text: `${time(i, 1)} s` }));
  const track = { name: "the run", role: "actual", points: path, labels } as const;
  const table: ValueTable = {
    caption: title,
    head: ["time, s", "corrected flow, kg/s", "pressure ratio"],
    rows: spreadIndices(path.length, TABLE_TIMES).map((i) => [
      time(i, 3),
      decimals(path[i][0], 4),
      decimals(path[i][1], 3),
    ]),
  };
  return figureBox(
    compressorMapPicture(slug("map", index), title, map, [track]),
    "The way of this run through the compressor map; rings mark times. Left of the surge line the flow is not stable.",
    table,
  );
}

/** The lowest margin that has this trace as its worst run. */
function leastMargin(evidence: Evidence, index: number): number {
  return evidence.requirements
    .flatMap(({ worst, corners }) => [worst, corners.worst])
    .reduce((least, worst) => (worst?.trace === index ? Math.min(least, worst.margin) : least), Infinity);
}

/** True for the run with the lowest margin of its scenario, the first of equals. */
function isWorstOfScenario(evidence: Evidence, index: number): boolean {
  const { scenario } = evidence.traces[index];
  const own = leastMargin(evidence, index);
  return evidence.traces.every((other, i) => {
    if (other.scenario !== scenario || i === index) return true;
    const least = leastMargin(evidence, i);
    return own < least || (own === least && index < i);
  });
}

/** Indices of the traces, the lowest margin first. */
function lowestFirst(evidence: Evidence): number[] {
  const margins = evidence.traces.map((_, i) => leastMargin(evidence, i));
  return [...margins.keys()].sort((a, b) => margins[a] - margins[b] || a - b);
}

function run(evidence: Evidence, trace: WorstTrace, index: number): Html {
  const id = slug("run", index);
  const plot = plotOf(evidence, trace, index);
  const map = isWorstOfScenario(evidence, index) ? evidence.compressorMap : undefined;
  return html`<article id="${id}" aria-labelledby="${id}-title">
<h3 id="${id}-title">${name(trace.scenario)} <span class="on">${trace.kind} run ${whole(trace.run)}</span></h3>
${reasons(evidence, index)}
${figureBox(
  tracePicture(plot),
  "One run over time. Wanted: after the ceilings, before guard and slew. Peaks are kept where samples are thinned out.",
  traceTable(plot),
)}
${map === undefined ? undefined : onTheMap(map, trace, index)}
</article>`;
}

/** The worst runs, over time and on the compressor map. */
export function worstRuns(evidence: Evidence): Html {
  return html`<section id="runs" aria-labelledby="runs-title">
<h2 id="runs-title">Worst runs</h2>
<p>The lowest margin first. Of each scenario, the run with the lowest margin is also shown on the compressor map.</p>
${evidence.traces.length === 0 ? html`<p>The evidence holds no traces.</p>` : lowestFirst(evidence).map((i) => run(evidence, evidence.traces[i], i))}
</section>`;
}
