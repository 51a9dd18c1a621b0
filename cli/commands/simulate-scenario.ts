import type { LoopSpec, ScenarioSpec } from "../../spec/index.ts";
import {
  type Draw,
  drawCorner,
  drawRun,
  type JudgedRun,
  loadController,
  requirementsOf,
  scatterNames,
  scenarioRunner,
  whyNotExercised,
} from "../../verification/index.ts";
import { generatedController } from "../controller.ts";
import { EXIT, type ExitCode } from "../exit-codes.ts";
import { requireOutputs } from "../files/require-outputs.ts";
import { writeFileWhole } from "../files/write-file.ts";
import { jsonText, mention, refuse } from "../findings.ts";
import { loadWithSettings } from "../load-with-settings.ts";
import { requirePlotKind, writePlot } from "../plot-file.ts";
import { requireScenario } from "../require-tests.ts";
import type { Session } from "../session.ts";
import { CSV_SIGNALS, traceCsv } from "../trace-csv.ts";

export interface ScenarioRunOptions {
  readonly scenario: string;
  /** `path=value`, value as in the spec. */
  readonly set: readonly string[];
  readonly seed: number;
  /** Index of a random run; absent: the middle of every range on the nominal plant. */
  readonly run?: number;
  readonly csv?: string;
  readonly plot?: string;
}

/** The middle of every range is the first corner run. */
function drawFor(scenario: ScenarioSpec, { run, seed }: ScenarioRunOptions): Draw {
  const scatter = scatterNames(scenario.plantScatter).length;
  return run === undefined ? drawCorner(scenario, scatter, seed, 0) : drawRun(scenario, scatter, seed, run);
}

const isViolated = (margin: number | undefined): boolean => margin !== undefined && margin < 0;

const marginWords = (margin: number | undefined, pattern: string): string => {
  if (margin === undefined) return `not exercised: ${whyNotExercised(pattern)}`;
  return `${margin < 0 ? "violated" : "holds"}, margin ${margin.toFixed(3)}`;
};

/** `simulate SPEC --scenario NAME`: one closed-loop run with the generated controller; exit 1 if it violates a requirement. */
export async function simulateScenario(
  specPath: string,
  options: ScenarioRunOptions,
  session: Session,
): Promise<ExitCode> {
  requirePlotKind(options.plot);
  const loaded = loadWithSettings(specPath, options.set);
  if (loaded.value === undefined) return refuse(loaded, session, "nothing was simulated");
  mention(loaded, session);
  const loop = loaded.value;
  const scenario = requireScenario(loop, options.scenario);
  const inputs = loaded.sources.map(({ file }) => file);
  requireOutputs({ "--csv": options.csv, "--plot": options.plot }, inputs);
  const port = await loadController(generatedController(loop), loop);
  const result = scenarioRunner(loop, scenario, port, CSV_SIGNALS)(drawFor(scenario, options));
  if (options.csv !== undefined) writeFileWhole(options.csv, traceCsv(result.trace));
  if (options.plot !== undefined)
    await writePlot(options.plot, `${loop.controller.name}: ${scenario.name}`, result.trace, loop);
  report(loop, scenario, options, result, session);
  return result.margins.some(isViolated) ? EXIT.findings : EXIT.fine;
}

function report(
  loop: LoopSpec,
  scenario: ScenarioSpec,
  options: ScenarioRunOptions,
  result: JudgedRun,
  session: Session,
): void {
  const margins = requirementsOf(loop, scenario).map(({ id, pattern }, i) => ({
    id,
    pattern: pattern.kind,
    margin: result.margins[i],
  }));
  const violated = margins.filter(({ margin }) => isViolated(margin)).map(({ id }) => id);
  if (session.json) {
    const { leftValidity: left_validity, clamped } = result;
    const written = { csv: options.csv ?? null, plot: options.plot ?? null };
    const rows = margins.map(({ id, margin }) => ({ id, margin: margin ?? null }));
    session.result(
      jsonText({
        ok: violated.length === 0,
        scenario: scenario.name,
        margins: rows,
        left_validity,
        clamped,
        ...written,
      }),
    );
    return;
  }
  const which =
    options.run === undefined
      ? "middle of every range, nominal plant"
      : `run ${options.run}, seed ${options.seed}`;
  session.note(`${scenario.name}: ${which}`);
  for (const { id, margin, pattern } of margins)
    session.note(`  ${id.padEnd(24)} ${marginWords(margin, pattern)}`);
  if (violated.length > 0) session.complain(`violated in \`${scenario.name}\`: ${violated.join(", ")}`);
  if (result.leftValidity)
    session.complain("the run left the range in which the plant file calls itself valid");
  if (result.clamped) session.complain("a state was held at its bound; do not rely on this run");
  for (const path of [options.csv, options.plot]) if (path !== undefined) session.note(`wrote ${path}`);
}
