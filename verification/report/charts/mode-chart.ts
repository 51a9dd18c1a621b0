import { axisY, barX, type PlotOptions, text } from "@observablehq/plot";
import { MODES } from "../../../hil-sim/index.ts";
import { colour } from "./palette.ts";
import { type TimeAxis, timeFrame, timeMarks } from "./panel-chart.ts";

const ROW_HEIGHT = 15;
const HEAD = 30;

export interface ModeStretch {
  readonly mode: string;
  readonly from: number;
  readonly to: number;
}

export function modeName(index: number): string {
  return MODES[index]?.replaceAll("_", " ") ?? `mode ${index}`;
}

/** Each stretch of one mode, in seconds. */
export function modeStretches(mode: ArrayLike<number>, length: number, stepS: number): ModeStretch[] {
  const stretches: ModeStretch[] = [];
  let from = 0;
  for (let i = 1; i <= length; i++) {
    if (i < length && mode[i] === mode[from]) continue;
    stretches.push({ mode: modeName(mode[from]), from: from * stepS, to: Math.min(i, length - 1) * stepS });
    from = i;
  }
  return stretches;
}

export function modeHeight(stretches: readonly ModeStretch[], axis: TimeAxis): number {
  const rows = new Set(stretches.map(({ mode }) => mode)).size;
  return HEAD + rows * ROW_HEIGHT + (axis.labelled ? 28 : 0);
}

/** A bar where each mode is active, one row per mode that occurs: the place tells the mode, not a colour. */
export function modeChart(stretches: readonly ModeStretch[], axis: TimeAxis): PlotOptions {
  const rows = [...new Set(stretches.map(({ mode }) => mode))];
  const frame = timeFrame(modeHeight(stretches, axis), axis);
  return {
    ...frame,
    y: { domain: rows, axis: null, padding: 0.35 },
    marks: [
      ...timeMarks(axis),
      axisY({ label: null, tickSize: 0, textAnchor: "end" }),
      barX(stretches, {
        x1: "from",
        x2: "to",
        y: "mode",
        fill: colour("ink"),
        clip: true,
      }),
      text(["controller mode"], {
        frameAnchor: "top-left",
        dy: -16,
        fill: colour("ink"),
        fontWeight: 600,
      }),
    ],
  };
}
