import type { CompressorMap } from "../evidence.ts";
import { compressorMapPicture, type MapTrack } from "./charts/compressor-map-picture.ts";
import { type Picture, pictureFile } from "./charts/picture.ts";
import { figureBox, type ValueTable } from "./figure.ts";
import { html, name } from "./html.ts";
import { decimals, whole } from "./numbers.ts";
import { page } from "./page.ts";

/** Equilibria of a plant, a line for each engine speed with the wastegate as its parameter. */
export interface SteadyPlot {
  readonly title: string;
  readonly map: CompressorMap;
  readonly lines: readonly {
    readonly engineSpeedRpm: number;
    /** In order of the opening. */
    readonly points: readonly SteadyPoint[];
  }[];
}

export interface SteadyPoint {
  readonly wastegateOpeningRatio: number;
  readonly boostPressureKpa: number;
  readonly turboSpeedRpm: number;
  readonly correctedFlowKgS: number;
  readonly pressureRatio: number;
}

/** The engine speed stands at the end with the most boost. */
function trackOf({ engineSpeedRpm, points }: SteadyPlot["lines"][number]): MapTrack {
  const most = points.reduce(
    (best, point, i) => (point.pressureRatio > points[best].pressureRatio ? i : best),
    0,
  );
  return {
    name: "equilibria, engine speed in rpm",
    role: "actual",
    points: points.map((point) => [point.correctedFlowKgS, point.pressureRatio] as const),
    labels: points.length === 0 ? [] : [{ index: most, text: String(engineSpeedRpm) }],
  };
}

function steadyPicture(plot: SteadyPlot): Picture {
  return compressorMapPicture("steady-1", plot.title, plot.map, plot.lines.map(trackOf));
}

function steadyTable(plot: SteadyPlot): ValueTable {
  return {
    caption: `${plot.title}: all points`,
    head: [
      "engine speed, rpm",
      "wastegate opening, ratio",
      "boost, kPa abs",
      "turbo speed, rpm",
      "corrected flow, kg/s",
      "pressure ratio",
    ],
    rows: plot.lines.flatMap(({ engineSpeedRpm, points }) =>
      points.map((point) => [
        whole(engineSpeedRpm),
        decimals(point.wastegateOpeningRatio, 3),
        decimals(point.boostPressureKpa, 1),
        whole(point.turboSpeedRpm),
        decimals(point.correctedFlowKgS, 4),
        decimals(point.pressureRatio, 3),
      ]),
    ),
  };
}

/** The steady map on the compressor's map, as an SVG file of its own in light colours. */
export function renderSteadySvg(plot: SteadyPlot): string {
  return pictureFile(steadyPicture(plot));
}

/** The steady map on the compressor's map, as a self-contained page with all points as a table. */
export function renderSteadyHtml(plot: SteadyPlot, notes: readonly string[] = []): string {
  const caption =
    "Equilibria at full throttle on the compressor map: one line per engine speed, upwards as the wastegate closes.";
  const body = html`<header><h1>${name(plot.title)}</h1>${notes.map((note) => html`<p>${name(note)}</p>`)}</header>
<main>${figureBox(steadyPicture(plot), caption, steadyTable(plot))}</main>`;
  return page(plot.title, body);
}
