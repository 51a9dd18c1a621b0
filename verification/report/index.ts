export type { Picture } from "./charts/picture.ts";
export type { TracePlot } from "./charts/trace-plot.ts";
export { renderReport } from "./render-report.ts";
export {
  renderSteadyHtml,
  renderSteadySvg,
  type SteadyPlot,
  type SteadyPoint,
} from "./render-steady-plot.ts";
export { renderTraceHtml, renderTraceSvg } from "./render-trace-plot.ts";
export type { Agreement, GeneratedFile, ReportContext } from "./report-context.ts";
export { type SettledPlant, steadyPlotOf } from "./steady-plot-of.ts";
export { tracePlotOf } from "./trace-plot-of.ts";
