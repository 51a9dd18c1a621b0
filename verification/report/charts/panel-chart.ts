import { axisX, axisY, gridX, gridY, type Markish, type PlotOptions, ruleY } from "@observablehq/plot";
import type { ChartData } from "./draw-chart.ts";
import { FRAME, legendMarks, PLOT_WIDTH, type Scales, seriesMark, strokeOf } from "./marks.ts";
import { colour } from "./palette.ts";
import { dropLevel, thinOut } from "./thin-out.ts";
import type { Panel, PanelLimit, PanelLine } from "./trace-panels.ts";
import type { TracePlot } from "./trace-plot.ts";

/** Stretches a line is thinned to: about one per three pixels, each with its least and its most. */
const BUCKETS = 220;
const BOTTOM = 6;
const BOTTOM_WITH_AXIS = 34;

interface Series {
  readonly line: PanelLine;
  readonly samples: readonly { readonly x: number; readonly y: number }[];
}

function seriesOf(panel: Panel, trace: TracePlot): Series[] {
  return panel.lines.flatMap((line) => {
    const values = trace.signals[line.signal];
    if (values === undefined) return [];
    const thinned = dropLevel(thinOut(values, Math.min(trace.length, values.length), trace.stepS, BUCKETS));
    return [{ line, samples: thinned.map(({ x, y }) => ({ x, y: y / panel.per })) }];
  });
}

function levelsOf(panel: Panel, trace: TracePlot): { limit: PanelLimit; level: number }[] {
  return panel.limits.flatMap((limit) => {
    const level = limit.from(trace.limits ?? {});
    return level === undefined || !Number.isFinite(level) ? [] : [{ limit, level: level / panel.per }];
  });
}

/** The given range, or all values and limits with a little air; never less than the panel's least span. */
function rangeOf(panel: Panel, values: readonly number[]): readonly [number, number] {
  if (panel.range !== undefined) return panel.range;
  const finite = values.filter(Number.isFinite);
  if (finite.length === 0) return [0, panel.leastSpan];
  const low = finite.reduce((a, b) => Math.min(a, b));
  const high = finite.reduce((a, b) => Math.max(a, b));
  const span = Math.max(high - low, panel.leastSpan);
  const middle = (high + low) / 2;
  return [middle - span * 0.54, middle + span * 0.54];
}

export interface TimeAxis {
  readonly duration: number;
  /** Only the lowest chart carries the labels. */
  readonly labelled: boolean;
}

export function timeMarks(axis: TimeAxis): Markish[] {
  const grid = gridX({ ticks: 8, stroke: colour("grid"), strokeOpacity: 1 });
  if (!axis.labelled) return [grid];
  return [grid, axisX({ ticks: 8, label: "time, s", labelArrow: "none", labelAnchor: "center" })];
}

export function panelHeight(panel: Pick<Panel, "height">, axis: TimeAxis): number {
  return panel.height + (axis.labelled ? BOTTOM_WITH_AXIS - BOTTOM : 0);
}

/** The options every chart on a time axis shares. */
export function timeFrame(height: number, axis: TimeAxis): PlotOptions {
  return {
    width: FRAME.width,
    height,
    marginLeft: FRAME.left,
    marginRight: FRAME.right,
    marginTop: FRAME.top,
    marginBottom: axis.labelled ? BOTTOM_WITH_AXIS : BOTTOM,
    x: { domain: [0, axis.duration], axis: null },
  };
}

export interface PanelChart {
  readonly options: PlotOptions;
  /** What the script needs to read values off the lines. */
  readonly data: ChartData;
}

/** Chart of one panel; undefined when the trace has none of its signals. */
export function panelChart(panel: Panel, trace: TracePlot, axis: TimeAxis): PanelChart | undefined {
  const series = seriesOf(panel, trace);
  if (series.length === 0) return undefined;
  const levels = levelsOf(panel, trace);
  const values = [
    ...series.flatMap(({ samples }) => samples.map(({ y }) => y)),
    ...levels.map((l) => l.level),
  ];
  const y = rangeOf(panel, values);
  const plotHeight = panel.height - FRAME.top - BOTTOM;
  const scales: Scales = { x: [0, axis.duration], y, plotWidth: PLOT_WIDTH, plotHeight };
  const names = [...series.map(({ line }) => line), ...levels.map(({ limit }) => limit)];
  const options: PlotOptions = {
    ...timeFrame(panelHeight(panel, axis), axis),
    y: { domain: [...y], axis: null },
    marks: [
      gridY({ ticks: 4, stroke: colour("grid"), strokeOpacity: 1 }),
      ...timeMarks(axis),
      axisY({ ticks: 4, label: null }),
      ...levels.map(({ limit, level }) => ruleY([level], strokeOf(limit.role))),
      ...series.map(({ line, samples }) => seriesMark(samples, line.role)),
      ...legendMarks(scales, panel.title, names),
    ],
  };
  const frame = { low: y[0], high: y[1], top: FRAME.top, bottom: FRAME.top + plotHeight };
  return { options, data: { ...frame, series: series.map(({ line }) => line.name).join("|") } };
}
