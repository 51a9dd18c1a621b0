/**
 * Runs in the reader's browser, hence text; the page is complete without it. Adds to each picture with a time axis
 * (`data-duration`, `data-left`, `data-right`; charts with `data-low`, `data-high`, `data-series`) a cursor that
 * reads the values of all its charts, and zoom of all its time axes together.
 */
export const PAGE_SCRIPT = `"use strict";
for (const svg of document.querySelectorAll("svg.picture[data-duration]")) addTools(svg);

function element(name, properties, parent) {
  const made = Object.assign(document.createElement(name), properties);
  parent.append(made);
  return made;
}

function addTools(svg) {
  const view = { svg, duration: Number(svg.dataset.duration), left: Number(svg.dataset.left),
    right: Number(svg.dataset.right), from: 0, to: Number(svg.dataset.duration), cursor: 0 };
  view.charts = Array.from(svg.querySelectorAll("svg[data-series]"), readChart);
  const tools = document.createElement("div");
  tools.className = "zoom";
  svg.parentElement.before(tools);
  const button = (words, act) => { element("button", { type: "button", textContent: words }, tools).onclick = act; };
  button("zoom in", () => zoom(view, 0.5));
  button("zoom out", () => zoom(view, 2));
  button("earlier", () => shift(view, -0.5));
  button("later", () => shift(view, 0.5));
  button("whole run", () => show(view, 0, view.duration));
  const label = element("label", { textContent: "time cursor " }, tools);
  view.slider = element("input", { type: "range", min: "0", max: "1000", value: "0" }, label);
  view.slider.oninput = () => read(view, view.from + (view.slider.value / 1000) * (view.to - view.from));
  view.output = element("output", {}, tools);
  view.line = document.createElementNS(svg.namespaceURI, "line");
  for (const [name, value] of [["y1", 0], ["y2", svg.viewBox.baseVal.height], ["stroke", "currentColor"],
    ["stroke-opacity", 0.6], ["visibility", "hidden"]]) view.line.setAttribute(name, value);
  svg.append(view.line);
  listen(view);
}

function readChart(chart) {
  const lines = Array.from(chart.querySelectorAll("g[clip-path]"), (group) => {
    const path = group.querySelector("path");
    const numbers = path === null ? [] : path.getAttribute("d").match(/-?[0-9.]+(?:e-?[0-9]+)?/g).map(Number);
    return Array.from({ length: numbers.length / 2 }, (_, i) => [numbers[2 * i], numbers[2 * i + 1]]);
  });
  return { chart, lines, names: chart.dataset.series.split("|"), low: Number(chart.dataset.low),
    high: Number(chart.dataset.high), top: Number(chart.dataset.top), bottom: Number(chart.dataset.bottom) };
}

function timeAt(view, event) {
  const box = view.svg.getBoundingClientRect();
  const x = ((event.clientX - box.left) / box.width) * view.svg.viewBox.baseVal.width;
  const share = Math.min(1, Math.max(0, (x - view.left) / (view.right - view.left)));
  return view.from + share * (view.to - view.from);
}

function listen(view) {
  let start;
  view.svg.addEventListener("pointermove", (event) => read(view, timeAt(view, event)));
  view.svg.addEventListener("pointerdown", (event) => {
    if (event.pointerType === "mouse" && event.button === 0) { start = timeAt(view, event); event.preventDefault(); }
  });
  addEventListener("pointerup", (event) => {
    if (start === undefined) return;
    const end = timeAt(view, event);
    if (Math.abs(end - start) > (view.to - view.from) / 50) show(view, Math.min(start, end), Math.max(start, end));
    start = undefined;
  });
}

function zoom(view, factor) {
  const half = (view.to - view.from) * factor / 2;
  const middle = view.cursor > view.from && view.cursor < view.to ? view.cursor : (view.from + view.to) / 2;
  show(view, middle - half, middle + half);
}

function shift(view, share) {
  const by = (view.to - view.from) * share;
  show(view, view.from + by, view.to + by);
}

function show(view, from, to) {
  const span = Math.min(view.duration, Math.max(to - from, view.duration / 1000));
  view.from = Math.min(Math.max(0, from), view.duration - span);
  view.to = view.from + span;
  const scale = view.duration / span;
  const move = view.left - scale * (view.left + (view.from / view.duration) * (view.right - view.left));
  for (const shape of view.svg.querySelectorAll("g[clip-path] path, g[clip-path] rect")) {
    shape.setAttribute("transform", "matrix(" + scale + " 0 0 1 " + move + " 0)");
    shape.setAttribute("vector-effect", "non-scaling-stroke");
  }
  for (const chart of view.svg.querySelectorAll(":scope > svg")) drawTicks(view, chart, scale === 1);
  read(view, Math.min(Math.max(view.cursor, view.from), view.to));
}

function ticks(view) {
  const rough = (view.to - view.from) / 8;
  const power = 10 ** Math.floor(Math.log10(rough));
  const step = [1, 2, 5, 10].map((n) => n * power).find((size) => size >= rough);
  const places = Math.max(0, -Math.floor(Math.log10(step)));
  const first = Math.ceil(view.from / step - 1e-9);
  const count = Math.floor(view.to / step + 1e-9) - first + 1;
  return Array.from({ length: Math.max(0, count) }, (_, i) => ({ time: (first + i) * step, places }));
}

function place(node, x) {
  if (node.hasAttribute("x1")) { node.setAttribute("x1", x); node.setAttribute("x2", x); }
  else node.setAttribute("transform", node.getAttribute("transform").replace(/translate\\([^,]*/, "translate(" + x));
}

function drawTicks(view, chart, whole) {
  for (const group of chart.querySelectorAll('g[data-part^="x-grid"], g[data-part^="x-axis tick"]')) {
    group.original = group.original || Array.from(group.children);
    if (whole || group.original.length === 0) { group.replaceChildren(...group.original); continue; }
    group.replaceChildren(...ticks(view).map(({ time, places }) => {
      const node = group.original[0].cloneNode(true);
      place(node, view.left + ((time - view.from) / (view.to - view.from)) * (view.right - view.left));
      if (node.nodeName === "text") node.textContent = time.toFixed(places);
      return node;
    }));
  }
}

function valueAt({ low, high, top, bottom }, points, x) {
  const after = points.findIndex((point) => point[0] >= x);
  if (after < 0) return undefined;
  const [b, a] = [points[after], points[Math.max(after - 1, 0)]];
  const y = b[0] === a[0] ? b[1] : a[1] + ((x - a[0]) / (b[0] - a[0])) * (b[1] - a[1]);
  return low + ((bottom - y) / (bottom - top)) * (high - low);
}

function read(view, time) {
  view.cursor = time;
  const share = (time - view.from) / (view.to - view.from);
  view.line.setAttribute("visibility", "visible");
  for (const end of ["x1", "x2"]) view.line.setAttribute(end, view.left + share * (view.right - view.left));
  view.slider.value = String(Math.round(share * 1000));
  const whole = view.left + (time / view.duration) * (view.right - view.left);
  const values = view.charts.flatMap((chart) => chart.names.map((name, i) => {
    const value = chart.lines[i] && valueAt(chart, chart.lines[i], whole);
    const places = Math.max(0, Math.ceil(2.5 - Math.log10(chart.high - chart.low)));
    return name + " " + (value === undefined ? "-" : value.toFixed(places));
  }));
  view.output.textContent = time.toFixed(3) + " s: " + values.join(", ");
}
`;
