import { parseHTML } from "linkedom";
import { describe, expect, test } from "vitest";
import {
  renderReport,
  renderSteadyHtml,
  renderSteadySvg,
  renderTraceHtml,
  renderTraceSvg,
  type SteadyPlot,
  type TracePlot,
} from "../../../verification/report/index.ts";
import { sampleEvidence, sampleTrace } from "./sample-evidence.ts";

interface Node {
  readonly textContent: string;
  getAttribute(name: string): string | null;
  querySelector(selector: string): Node | null;
  querySelectorAll(selector: string): Iterable<Node>;
}

const read = (text: string): Node => parseHTML(text.replace(/^<\?xml.*\n/, "")).document as unknown as Node;
const texts = (node: Node, selector: string): string[] =>
  Array.from(node.querySelectorAll(selector), ({ textContent }) => textContent);

function tracePlot(over: Partial<TracePlot> = {}): TracePlot {
  const { signals, mode, stepS } = sampleTrace("tip_in", 1);
  const { limits } = sampleEvidence().controller;
  return { id: "run", title: "tip_in", stepS, length: 401, signals, mode, limits, ...over };
}

/** Points of a drawn line in pixels. */
function pointsOf(path: Node | null): number[][] {
  const numbers = (path?.getAttribute("d")?.match(/-?[\d.]+/g) ?? []).map(Number);
  return Array.from({ length: numbers.length / 2 }, (_, i) => [numbers[2 * i], numbers[2 * i + 1]]);
}

describe("a run as charts", () => {
  test("as an SVG file it stands alone: fixed colours, white paper, no script, no variables", () => {
    const text = renderTraceSvg(tracePlot());
    expect(text).toMatch(
      /^<\?xml version="1\.0" encoding="UTF-8"\?>\n<svg xmlns="http:\/\/www\.w3\.org\/2000\/svg"/,
    );
    expect(text).not.toMatch(/var\(|<script|NaN/);
    expect(text).toContain('<rect width="100%" height="100%" fill="#ffffff"/>');
    expect(renderTraceSvg(tracePlot())).toBe(text);
  });

  test("charts of signals that the run does not hold are left out, the last chart carries the time axis", () => {
    const { boost_pressure, boost_wanted } = sampleTrace("tip_in", 1).signals;
    const { mode: _mode, ...plot } = tracePlot({
      signals: { boost_pressure, boost_wanted } as TracePlot["signals"],
    });
    const svg = read(renderTraceSvg(plot));
    expect(texts(svg, "svg svg")).toHaveLength(1);
    expect(texts(svg, 'svg svg:last-child [data-part="x-axis label"]')).toEqual(["time, s"]);
    expect(texts(svg, "svg svg text").filter((words) => words === "target followed")).toEqual([]);
  });

  test("time runs along the same pixels in every chart", () => {
    const svg = read(renderTraceSvg(tracePlot()));
    const ends = Array.from(svg.querySelectorAll("g[clip-path] path"), (path) => {
      const points = pointsOf(path);
      return [points[0][0], points.at(-1)?.[0]];
    });
    expect(ends).toHaveLength(9);
    expect(new Set(ends.map(String))).toEqual(new Set(["72,746"]));
  });

  test.each([
    ["boost_pressure", 0, 2, 1],
    ["turbo_speed", 2, 0, 1000],
    ["accelerator", 3, 1, 0.01],
  ] as const)(
    "the highest pixel of %s is its highest value, in the unit shown",
    (signal, chartIndex, lineIndex, per) => {
      const chart = Array.from(read(renderTraceSvg(tracePlot())).querySelectorAll("svg svg"))[chartIndex];
      const [low, high, top, bottom] = ["low", "high", "top", "bottom"].map((field) =>
        Number(chart.getAttribute(`data-${field}`)),
      );
      const line = Array.from(chart.querySelectorAll("g[clip-path] path"))[lineIndex];
      const peak = Math.min(...pointsOf(line).map(([, y]) => y));
      const value = low + ((bottom - peak) / (bottom - top)) * (high - low);
      expect(value).toBeCloseTo(Math.max(...(sampleTrace("tip_in", 1).signals[signal] ?? [])) / per, 1);
    },
  );

  test("each mode that occurs has a row with a bar for each stretch", () => {
    const mode = [0, 0, 2, 2, 2, 4, 2, 9];
    const svg = read(renderTraceSvg(tracePlot({ mode, length: 8, signals: {} })));
    expect(texts(svg, '[data-part="y-axis tick label"] text')).toEqual([
      "start",
      "closed loop",
      "fail safe",
      "mode 9",
    ]);
    expect(texts(svg, "g[clip-path] rect")).toHaveLength(5);
  });

  test("the page has every value of the charts in its table, and its notes and title are escaped", () => {
    const page = read(renderTraceHtml(tracePlot({ title: "<i>run</i>" }), ["<b>note</b>"]));
    expect(texts(page, "h1, header p")).toEqual(["<i>run</i>", "<b>note</b>"]);
    const head = texts(page, "details thead th");
    expect(head[0]).toBe("time, s");
    expect(head).toContain("boost pressure, kPa abs");
    expect(head.at(-1)).toBe("mode");
    const rows = Array.from(page.querySelectorAll("details tbody tr"), (row) => texts(row, "th, td"));
    expect(rows).toHaveLength(25);
    expect(rows[0].length).toBe(head.length);
    expect(rows.at(-1)?.[0]).toBe("4.000");
  });

  test("an empty run and a run of holes draw without complaint", () => {
    for (const values of [[], [Number.NaN, Infinity, Number.NaN]]) {
      const plot = tracePlot({ signals: { boost_pressure: values }, mode: [], length: values.length });
      expect(renderTraceSvg(plot)).not.toMatch(/NaN|Infinity/);
      expect(renderTraceHtml(plot)).toContain("</html>");
    }
  });
});

describe("the steady map on the compressor map", () => {
  const point = (opening: number, flow: number, pressureRatio: number) => ({
    wastegateOpeningRatio: opening,
    boostPressureKpa: pressureRatio * 101.3,
    turboSpeedRpm: 90_000,
    correctedFlowKgS: flow,
    pressureRatio,
  });
  const plot: SteadyPlot = {
    title: "Steady map of skarn24",
    map: sampleEvidence().compressorMap as SteadyPlot["map"],
    lines: [
      { engineSpeedRpm: 3000, points: [point(0, 0.12, 2.4), point(0.2, 0.1, 1.8), point(1, 0.08, 1.1)] },
      { engineSpeedRpm: 5000, points: [point(0, 0.24, 2.9), point(1, 0.16, 1.2)] },
      { engineSpeedRpm: 7000, points: [] },
    ],
  };

  test("draws a line per engine speed with its label where boost is highest, over speed lines, surge and choke", () => {
    const svg = read(renderSteadySvg(plot));
    expect(texts(svg, "text")).toEqual(
      expect.arrayContaining(["3000", "5000", "surge line", "choke", "160"]),
    );
    expect(texts(svg, "text")).not.toContain("7000");
    expect(texts(svg, "g[clip-path] path")).toHaveLength(6 + 2 + 2);
  });

  test("puts the label at the point of most boost, whatever the order of the points", () => {
    for (const points of [plot.lines[0].points, plot.lines[0].points.toReversed()]) {
      const svg = read(renderSteadySvg({ ...plot, lines: [{ engineSpeedRpm: 3000, points }] }));
      const path = Array.from(svg.querySelectorAll("g[clip-path] path")).at(-1);
      const top = Math.min(...pointsOf(path ?? null).map(([, y]) => y));
      expect(Number(svg.querySelector("circle")?.getAttribute("cy"))).toBeCloseTo(top, 1);
    }
  });

  test("lists all points", () => {
    const rows = Array.from(read(renderSteadyHtml(plot)).querySelectorAll("details tbody tr"), (row) =>
      texts(row, "th, td"),
    );
    expect(rows).toHaveLength(5);
    expect(rows[0]).toEqual(["3000", "0.000", "243.1", "90\u202F000", "0.1200", "2.400"]);
  });
});

test("a run that flows backwards or below ambient stays inside its map", () => {
  const base = sampleEvidence();
  const trace = sampleTrace("tip_in", 1);
  const operating = { correctedFlowKgS: [0.05, -0.04, 0.3, 0.9], pressureRatio: [1.2, 0.7, 5.5, 2] };
  const page = read(renderReport({ ...base, traces: [{ ...trace, operating }] }));
  const run = Array.from(page.querySelectorAll("#map-1-figure g[clip-path] path")).at(-1);
  for (const [x, y] of pointsOf(run ?? null)) {
    expect(x).toBeGreaterThanOrEqual(72);
    expect(x).toBeLessThanOrEqual(726);
    expect(y).toBeGreaterThanOrEqual(24);
    expect(y).toBeLessThanOrEqual(432);
  }
  expect(pointsOf(run ?? null)).toHaveLength(4);
});
