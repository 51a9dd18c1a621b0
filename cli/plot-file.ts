import { extname } from "node:path";
import type { Trace } from "../hil-sim/index.ts";
import type { LoopSpec } from "../spec/index.ts";
import { CommandFailure } from "./command-failure.ts";
import { writeFileWhole } from "./files/write-file.ts";

/** Ends the command before any work if the plot's kind is unknown. */
export function requirePlotKind(path: string | undefined): void {
  if (path !== undefined && ![".svg", ".html"].includes(extname(path))) {
    throw new CommandFailure(`--plot writes .svg or .html, not ${path}`);
  }
}

/** Draws a run with the limits of its spec. The drawing library is loaded only here. */
export async function writePlot(path: string, title: string, trace: Trace, loop: LoopSpec): Promise<void> {
  const { renderTraceHtml, renderTraceSvg, tracePlotOf } = await import("../verification/report/index.ts");
  const { limitsOf } = await import("../verification/index.ts");
  const plot = tracePlotOf(title, trace, limitsOf(loop.controller));
  writeFileWhole(path, extname(path) === ".svg" ? renderTraceSvg(plot) : renderTraceHtml(plot));
}
