import {
  axisX,
  axisY,
  dot,
  gridX,
  gridY,
  line,
  type Markish,
  type PlotOptions,
  text,
} from "@observablehq/plot";
import type { CompressorMap, MapPoint } from "../../evidence.ts";
import { drawChart } from "./draw-chart.ts";
import type { LineRole } from "./line-style.ts";
import { FRAME, legendMarks, strokeOf } from "./marks.ts";
import { colour } from "./palette.ts";
import type { Picture } from "./picture.ts";

const HEIGHT = 470;
const BOTTOM = 38;
const RIGHT = 34;
const SIZES = {
  width: FRAME.width,
  height: HEIGHT,
  marginLeft: FRAME.left,
  marginRight: RIGHT,
  marginTop: FRAME.top,
  marginBottom: BOTTOM,
} as const;
const LABEL_WIDTH = 34;
const LABEL_HEIGHT = 15;

/** A path or a set of points on the map, with the labels along it. */
export interface MapTrack {
  readonly name: string;
  readonly role: LineRole;
  readonly points: readonly MapPoint[];
  /** Labels by index of the point they stand at. */
  readonly labels: readonly { readonly index: number; readonly text: string }[];
}

interface Frame {
  readonly x: readonly [number, number];
  readonly y: readonly [number, number];
}

const isShown = ([flow, ratio]: MapPoint): boolean => Number.isFinite(flow) && Number.isFinite(ratio);

/** From just below zero flow (or the tracks' reverse flow) to just beyond everything drawn. */
function frameOf(map: CompressorMap, tracks: readonly MapTrack[]): Frame {
  const tracked = tracks.flatMap(({ points }) => points);
  const all = [
    ...map.surge,
    ...map.choke,
    ...map.speedLines.flatMap(({ points }) => points),
    ...tracked,
  ].filter(isShown);
  const flows = all.map(([flow]) => flow);
  const ratios = all.map(([, ratio]) => ratio);
  const most = (values: readonly number[], otherwise: number): number =>
    values.reduce((a, b) => Math.max(a, b), otherwise);
  const least = tracked.filter(isShown).reduce((a, [flow]) => Math.min(a, flow), 0);
  const lowest = tracked.filter(isShown).reduce((a, [, ratio]) => Math.min(a, ratio), 0.92);
  return { x: [least * 1.05, most(flows, 0.01) * 1.03], y: [lowest - 0.02, most(ratios, 1.1) * 1.04] };
}

function pathMark(points: readonly MapPoint[], role: LineRole): Markish {
  return line(points, { x: (p: MapPoint) => p[0], y: (p: MapPoint) => p[1], clip: true, ...strokeOf(role) });
}

/** The speed at the foot of each line, in 1000 rpm. */
function speedLabels(map: CompressorMap, frame: Frame): Markish {
  const feet = map.speedLines.flatMap(({ correctedSpeedRpm, points }) => {
    const inside = points.filter((point) => isShown(point) && point[1] >= frame.y[0]);
    const foot = inside.reduce<MapPoint | undefined>(
      (a, b) => (a === undefined || b[1] < a[1] ? b : a),
      undefined,
    );
    return foot === undefined
      ? []
      : [{ flow: foot[0], ratio: foot[1], words: (correctedSpeedRpm / 1000).toFixed(0) }];
  });
  return text(feet, {
    x: "flow",
    y: "ratio",
    text: "words",
    dx: 4,
    dy: -5,
    textAnchor: "start",
    fill: colour("soft"),
    stroke: colour("paper"),
    strokeWidth: 4,
  });
}

interface PlacedLabel {
  readonly flow: number;
  readonly ratio: number;
  readonly words: string;
}

/** Labels in their order, leaving out those that would stand in one already placed. */
function withoutCollisions(track: MapTrack, { x, y }: Frame): PlacedLabel[] {
  const width = (LABEL_WIDTH / (FRAME.width - FRAME.left - RIGHT)) * (x[1] - x[0]);
  const height = (LABEL_HEIGHT / (HEIGHT - FRAME.top - BOTTOM)) * (y[1] - y[0]);
  const placed: PlacedLabel[] = [];
  for (const { index, text: words } of track.labels) {
    const point = track.points[index];
    if (point === undefined || !isShown(point)) continue;
    const [flow, ratio] = point;
    const collides = (other: PlacedLabel): boolean =>
      Math.abs(other.flow - flow) < width && Math.abs(other.ratio - ratio) < height;
    if (!placed.some(collides)) placed.push({ flow, ratio, words });
  }
  return placed;
}

function trackMarks(track: MapTrack, frame: Frame): Markish[] {
  const labelled = withoutCollisions(track, frame);
  const place = { x: "flow", y: "ratio" };
  return [
    pathMark(track.points, track.role),
    dot(labelled, {
      ...place,
      r: 3,
      fill: colour("paper"),
      ...strokeOf(track.role),
      strokeDasharray: "none",
    }),
    text(labelled, {
      ...place,
      text: "words",
      dy: -10,
      fill: colour("ink"),
      stroke: colour("paper"),
      strokeWidth: 4,
    }),
  ];
}

function axisMarks(): Markish[] {
  const grid = { ticks: 8, stroke: colour("grid"), strokeOpacity: 1 };
  const words = "corrected flow per turbo, kg/s";
  return [
    gridX(grid),
    gridY(grid),
    axisX({ ticks: 8, label: words, labelArrow: "none", labelAnchor: "center" }),
    axisY({ ticks: 8, label: null }),
  ];
}

function legendEntries(tracks: readonly MapTrack[]): { readonly role: LineRole; readonly name: string }[] {
  return [
    ...tracks.slice(0, 1).map(({ role, name }) => ({ role, name })),
    { role: "limit", name: "surge line" },
    { role: "followed", name: "choke" },
    { role: "context", name: "speed, 1000 rpm" },
  ];
}

function mapChart(map: CompressorMap, tracks: readonly MapTrack[]): PlotOptions {
  const frame = frameOf(map, tracks);
  const plotWidth = FRAME.width - FRAME.left - RIGHT;
  const scales = { ...frame, plotWidth, plotHeight: HEIGHT - FRAME.top - BOTTOM };
  return {
    ...SIZES,
    x: { domain: [...frame.x], axis: null },
    y: { domain: [...frame.y], axis: null },
    marks: [
      ...axisMarks(),
      ...map.speedLines.map(({ points }) => pathMark(points, "context")),
      pathMark(map.surge, "limit"),
      pathMark(map.choke, "followed"),
      speedLabels(map, frame),
      ...tracks.flatMap((track) => trackMarks(track, frame)),
      ...legendMarks(scales, "pressure ratio", legendEntries(tracks)),
    ],
  };
}

/** Tracks on the compressor's map with its speed lines, surge line and choke. */
export function compressorMapPicture(
  id: string,
  title: string,
  map: CompressorMap,
  tracks: readonly MapTrack[],
): Picture {
  return {
    id,
    title,
    description:
      "Pressure ratio over corrected flow, with the lines of constant corrected speed, the surge line to their left " +
      "and choke to their right. The table below gives the points of the path.",
    width: FRAME.width,
    height: HEIGHT,
    charts: [drawChart(mapChart(map, tracks), id)],
  };
}
