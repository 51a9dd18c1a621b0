import {
  axisX,
  axisY,
  dot,
  gridX,
  type Markish,
  type PlotOptions,
  ruleX,
  ruleY,
  tickX,
} from "@observablehq/plot";
import type { RequirementResult } from "../../evidence.ts";
import { drawChart } from "./draw-chart.ts";
import { strokeOf } from "./marks.ts";
import { colour } from "./palette.ts";
import type { Picture } from "./picture.ts";

const SIZES = { width: 760, marginLeft: 250, marginRight: 16, marginTop: 28, marginBottom: 36 } as const;
const ROW = 20;
/** What lies far from the edge needs no place: longer bars are cut here. */
const MOST_SHOWN = 1.5;
const LONGEST_LABEL = 38;

interface Row {
  readonly key: string;
  readonly label: string;
  readonly least: number;
  /** Worst corner run; NaN when there is none. */
  readonly corner: number;
  readonly low: number;
  readonly median: number;
  readonly high: number;
}

function shortened(text: string): string {
  const characters = [...text];
  return characters.length <= LONGEST_LABEL
    ? text
    : `${characters.slice(0, LONGEST_LABEL - 1).join("")}\u2026`;
}

function rowOf(result: RequirementResult, i: number): Row[] {
  const quantiles = result.margins?.quantiles;
  if (quantiles === undefined || !Object.values(quantiles).every(Number.isFinite)) return [];
  const label = shortened(`${result.id} / ${result.scenario}`);
  const { least, p05, median, p95 } = quantiles;
  const corner = result.corners.worst?.margin ?? Number.NaN;
  return [{ key: String(i), label, least, corner, low: p05, median, high: p95 }];
}

function atMargin(field: "least" | "corner") {
  return { y: "key", x: (row: Row) => Math.min(row[field], MOST_SHOWN) };
}

function rowMarks(rows: readonly Row[]): Markish[] {
  return [
    ruleY(rows, {
      y: "key",
      x1: "low",
      x2: "high",
      clip: true,
      stroke: colour("blue"),
      strokeWidth: 5,
      strokeOpacity: 0.5,
    }),
    tickX(rows, {
      clip: true,
      y: "key",
      x: "median",
      stroke: colour("ink"),
      strokeWidth: 2,
      insetTop: 3,
      insetBottom: 3,
    }),
    dot(rows, {
      ...atMargin("least"),
      r: 4,
      symbol: "diamond",
      fill: colour("paper"),
      stroke: colour("ink"),
    }),
    dot(rows, { ...atMargin("corner"), r: 3.5, symbol: "times", stroke: colour("ink"), strokeWidth: 1.6 }),
  ];
}

function overviewChart(rows: readonly Row[], height: number): PlotOptions {
  const least = rows.reduce(
    (a, row) => Math.min(a, row.least, Number.isFinite(row.corner) ? row.corner : 0),
    0,
  );
  const most = Math.min(
    rows.reduce((a, row) => Math.max(a, row.high), 1),
    MOST_SHOWN,
  );
  const labels = new Map(rows.map(({ key, label }) => [key, label]));
  const words = "margin (0: the edge, negative: violated)";
  return {
    ...SIZES,
    height,
    x: { domain: [least - 0.05 * (most - least), most], axis: null },
    y: { domain: rows.map(({ key }) => key), type: "band", padding: 0.2, axis: null },
    marks: [
      gridX({ ticks: 8, stroke: colour("grid"), strokeOpacity: 1 }),
      axisX({ ticks: 8, label: words, labelArrow: "none", labelAnchor: "center" }),
      axisY({ label: null, tickSize: 0, tickFormat: (key: string) => labels.get(key) ?? "" }),
      ruleX([0], strokeOf("limit")),
      ...rowMarks(rows),
    ],
  };
}

/** Worst, middle and spread of the margins of every requirement, one row each; undefined without margins. */
export function marginOverviewPicture(
  id: string,
  results: readonly RequirementResult[],
): Picture | undefined {
  const rows = results.flatMap(rowOf);
  if (rows.length === 0) return undefined;
  const height = SIZES.marginTop + SIZES.marginBottom + rows.length * ROW;
  return {
    id,
    title: "Margins of all requirements",
    description: "One row per requirement and scenario. The requirement table gives the same values.",
    width: SIZES.width,
    height,
    charts: [drawChart(overviewChart(rows, height), id)],
  };
}
