import { drawChart } from "./draw-chart.ts";
import { FRAME } from "./marks.ts";
import { modeChart, modeHeight, modeStretches } from "./mode-chart.ts";
import { type PanelChart, panelChart, panelHeight, type TimeAxis } from "./panel-chart.ts";
import type { Picture } from "./picture.ts";
import { PANELS } from "./trace-panels.ts";
import type { TracePlot } from "./trace-plot.ts";

const GAP = 6;

interface Sized {
  readonly chart: PanelChart;
  readonly height: number;
}

function panelCharts(trace: TracePlot, duration: number, labelled: boolean): Sized[] {
  const drawn = PANELS.filter((panel) =>
    panel.lines.some(({ signal }) => trace.signals[signal] !== undefined),
  );
  return drawn.flatMap((panel, i) => {
    const axis: TimeAxis = { duration, labelled: labelled && i === drawn.length - 1 };
    const chart = panelChart(panel, trace, axis);
    return chart === undefined ? [] : [{ chart, height: panelHeight(panel, axis) }];
  });
}

function modeRow(trace: TracePlot, duration: number): Sized[] {
  if (trace.mode === undefined || trace.length === 0) return [];
  const axis: TimeAxis = { duration, labelled: true };
  const stretches = modeStretches(trace.mode, Math.min(trace.length, trace.mode.length), trace.stepS);
  return [{ chart: { options: modeChart(stretches, axis), data: {} }, height: modeHeight(stretches, axis) }];
}

/** The run as charts below each other on one time axis, the mode last. */
export function tracePicture(trace: TracePlot): Picture {
  const duration = Math.max(trace.length - 1, 1) * trace.stepS;
  const mode = modeRow(trace, duration);
  const charts: string[] = [];
  let y = 0;
  for (const { chart, height } of [...panelCharts(trace, duration, mode.length === 0), ...mode]) {
    charts.push(drawChart(chart.options, `${trace.id}-${charts.length + 1}`, y, chart.data));
    y += height + GAP;
  }
  return {
    id: trace.id,
    title: trace.title,
    description:
      "Charts of one run below each other on one time axis; the table below gives the same values.",
    width: FRAME.width,
    height: Math.max(y - GAP, 1),
    charts,
    data: { duration, left: FRAME.left, right: FRAME.width - FRAME.right },
  };
}
