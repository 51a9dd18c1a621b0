import { axisX, axisY, gridY, type Markish, type PlotOptions, rectY, ruleX, text } from "@observablehq/plot";
import type { MarginDistribution } from "../../evidence.ts";
import { drawChart } from "./draw-chart.ts";
import { strokeOf } from "./marks.ts";
import { colour } from "./palette.ts";
import type { Picture } from "./picture.ts";

const SIZES = {
  width: 420,
  height: 170,
  marginLeft: 52,
  marginRight: 14,
  marginTop: 24,
  marginBottom: 36,
} as const;

export interface Bin {
  readonly low: number;
  readonly high: number;
  readonly count: number;
}

export function binsOf({ low, high, counts }: MarginDistribution["histogram"]): Bin[] {
  const width = (high - low) / Math.max(counts.length, 1);
  return counts.map((count, i) => ({ low: low + i * width, high: low + (i + 1) * width, count }));
}

function barMarks(bins: readonly Bin[]): Markish[] {
  const place = { x1: "low", x2: "high", y: "count", insetLeft: 0.5, insetRight: 0.5 };
  const holds = bins.filter(({ high }) => high > 0);
  const violated = bins.filter(({ high }) => high <= 0);
  return [
    rectY(holds, { ...place, fill: colour("blue"), fillOpacity: 0.35, stroke: colour("blue") }),
    rectY(violated, { ...place, fill: colour("ink") }),
  ];
}

function histogramChart(bins: readonly Bin[]): PlotOptions {
  const most = bins.reduce((a, { count }) => Math.max(a, count), 1);
  const domain = [Math.min(bins[0]?.low ?? 0, 0), Math.max(bins.at(-1)?.high ?? 1, 0)];
  const words = "margin (negative: violated)";
  return {
    ...SIZES,
    x: { domain, axis: null },
    y: { domain: [0, most * 1.05], axis: null },
    marks: [
      gridY({ ticks: 4, stroke: colour("grid"), strokeOpacity: 1 }),
      axisX({ ticks: 6, label: words, labelArrow: "none", labelAnchor: "center" }),
      axisY({
        ticks: 4,
        label: null,
        tickFormat: (count: number) => (Number.isInteger(count) ? `${count}` : ""),
      }),
      ...barMarks(bins),
      ruleX([0], strokeOf("limit")),
      text(["runs"], { frameAnchor: "top-left", dy: -14, fontWeight: 600, fill: colour("ink") }),
    ],
  };
}

/** How the margins of the random runs are spread; bars left of the edge are solid, the others are pale. */
export function histogramPicture(id: string, title: string, margins: MarginDistribution): Picture {
  return {
    id,
    title,
    description: "Number of random runs over their margin. The table below gives the same counts.",
    width: SIZES.width,
    height: SIZES.height,
    charts: [drawChart(histogramChart(binsOf(margins.histogram)), id)],
  };
}
