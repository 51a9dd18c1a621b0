import {
  type OpenLoopResult,
  openLoopCsv,
  plantParameters,
  readInputs,
  simulateOpenLoop,
} from "../../hil-sim/index.ts";
import { CommandFailure } from "../command-failure.ts";
import { EXIT, type ExitCode } from "../exit-codes.ts";
import { inputsFinding } from "../file-findings.ts";
import { requireOutputs } from "../files/require-outputs.ts";
import { writeFileWhole } from "../files/write-file.ts";
import { jsonText, mention, refuse } from "../findings.ts";
import { loadPlant } from "../load-loop.ts";
import { loadSource } from "../load-source.ts";
import type { Session } from "../session.ts";

export interface PlantRunOptions {
  readonly inputs: string;
  readonly csv?: string;
}

/** What a reader must know before trusting the rows. */
function remarks(result: OpenLoopResult): string[] {
  return [
    ...(result.startedSteady
      ? []
      : ["the first row has no steady state (surge); the start is where the search ended"]),
    ...(result.clamps > 0
      ? [`${result.clamps} times a state was held at its bound; do not rely on this run`]
      : []),
    ...(result.sawNotANumber
      ? ["the run produced a value that is not a number; do not rely on this run"]
      : []),
  ];
}

/** `simulate PLANT --inputs FILE.csv`: the plant alone, open loop. */
export function simulatePlant(plantPath: string, options: PlantRunOptions, session: Session): ExitCode {
  const loaded = loadPlant(plantPath);
  if (loaded.value === undefined) return refuse(loaded, session, "nothing was simulated");
  mention(loaded, session);
  const { source, diagnostics } = loadSource(options.inputs);
  if (source === undefined) return refuse({ diagnostics, sources: [] }, session, "nothing was simulated");
  const { rows, problems } = readInputs(source.text);
  if (rows === undefined) {
    const found = problems.map((problem) => inputsFinding(options.inputs, problem));
    return refuse({ diagnostics: found, sources: [source] }, session, "nothing was simulated");
  }
  requireOutputs({ "--csv": options.csv }, [plantPath, options.inputs]);
  const result = simulateOpenLoop(plantParameters(loaded.value), rows);
  for (const remark of remarks(result)) session.complain(`spoolwright: ${remark}`);
  if (options.csv === undefined && session.json)
    throw new CommandFailure("--json needs --csv FILE for the rows");
  if (options.csv === undefined) session.result(openLoopCsv(result.rows));
  else writeFileWhole(options.csv, openLoopCsv(result.rows));
  if (session.json)
    session.result(
      jsonText({ ok: true, rows: result.rows.length, csv: options.csv, remarks: remarks(result) }),
    );
  else if (options.csv !== undefined)
    session.note(`wrote ${options.csv}: ${result.rows.length} rows, one per 10 ms`);
  return EXIT.fine;
}
