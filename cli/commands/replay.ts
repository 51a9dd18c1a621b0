import { dirname, join } from "node:path";
import type { LoopSpec } from "../../spec/index.ts";
import {
  type Counterexample,
  drawOfCounterexample,
  loadController,
  loopHashes,
  readCounterexample,
  replay as replayRun,
} from "../../verification/index.ts";
import { generatedController } from "../controller.ts";
import { EXIT, type ExitCode } from "../exit-codes.ts";
import { requireOutputs } from "../files/require-outputs.ts";
import { writeFileWhole } from "../files/write-file.ts";
import { jsonText, mention, refuse } from "../findings.ts";
import { loadLoop } from "../load-loop.ts";
import { loadSource } from "../load-source.ts";
import { requirePlotKind, writePlot } from "../plot-file.ts";
import { requirePlant } from "../require-tests.ts";
import type { Session } from "../session.ts";
import { traceCsv } from "../trace-csv.ts";

export interface ReplayOptions {
  /** Absent: the spec that the file names, beside it. */
  readonly spec?: string;
  readonly plot?: string;
  readonly csv?: string;
}

/** What has changed in meaning since the counterexample was found. */
function changes({ hashes }: Counterexample, loop: LoopSpec): string[] {
  const now = loopHashes(loop);
  return [
    ...(now.controller === hashes.controller ? [] : ["the controller has changed since this run was found"]),
    ...(now.plantAndTests === hashes.plantAndTests
      ? []
      : ["plant, scenarios or requirements have changed since this run was found"]),
  ];
}

/** `replay COUNTEREXAMPLE`: runs it again; exit 1 while it still violates its requirement. */
export async function replay(path: string, options: ReplayOptions, session: Session): Promise<ExitCode> {
  requirePlotKind(options.plot);
  const { source, diagnostics } = loadSource(path);
  if (source === undefined) return refuse({ diagnostics, sources: [] }, session, "nothing was run");
  const read = readCounterexample(source);
  const { counterexample } = read;
  if (counterexample === undefined) return refuse({ ...read, sources: [source] }, session, "nothing was run");
  const loaded = loadLoop(options.spec ?? join(dirname(path), counterexample.spec));
  if (loaded.value === undefined) return refuse(loaded, session, "nothing was run");
  mention(loaded, session);
  const loop = loaded.value;
  requirePlant(loop);
  const found = drawOfCounterexample(counterexample, loop);
  if (found.located === undefined) return refuse({ ...found, sources: [source] }, session, "nothing was run");
  const inputs = [path, ...loaded.sources.map(({ file }) => file)];
  requireOutputs({ "--csv": options.csv, "--plot": options.plot }, inputs);
  const port = await loadController(generatedController(loop), loop);
  const { margin, trace } = replayRun(loop, found.located, port);
  if (options.csv !== undefined) writeFileWhole(options.csv, traceCsv(trace));
  if (options.plot !== undefined) {
    await writePlot(options.plot, `${counterexample.requirement} in ${counterexample.scenario}`, trace, loop);
  }
  report(counterexample, margin, loop, options, session);
  return margin !== undefined && margin < 0 ? EXIT.findings : EXIT.fine;
}

function report(
  counterexample: Counterexample,
  margin: number | undefined,
  loop: LoopSpec,
  options: ReplayOptions,
  session: Session,
): void {
  const { requirement, scenario, says } = counterexample;
  const violated = margin !== undefined && margin < 0;
  const written = [options.csv, options.plot].filter((file) => file !== undefined);
  if (session.json) {
    const found = { margin_found: counterexample.margin, margin: margin ?? null };
    session.result(
      jsonText({
        ok: !violated,
        requirement,
        scenario,
        ...found,
        changes: changes(counterexample, loop),
        written,
      }),
    );
    return;
  }
  const place = loop.requirements.find(({ id }) => id === requirement)?.at;
  const outcome = violated ? "violated" : margin === undefined ? "not exercised any more" : "holds now";
  const figures =
    margin === undefined
      ? ""
      : `: margin ${margin.toFixed(3)}, ${counterexample.margin.toFixed(3)} when it was found`;
  const text = [
    `requirement \`${requirement}\` ${outcome} in \`${scenario}\`${figures}`,
    `  ${says}   ${place?.file}:${place?.line}`,
  ];
  (violated ? session.complain : session.note)(text.join("\n"));
  for (const change of changes(counterexample, loop)) session.note(change);
  for (const file of written) session.note(`wrote ${file}`);
}
