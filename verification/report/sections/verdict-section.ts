import type { Evidence, RequirementResult, WorstRun } from "../../evidence.ts";
import { neverExercised, untested, whyNotExercised } from "../../not-exercised.ts";
import { byVerdict, type Placed } from "../by-verdict.ts";
import { type Html, html, name } from "../html.ts";
import { margin } from "../numbers.ts";
import { replayCommand } from "../replay-command.ts";
import { slug } from "../slug.ts";
import { overallVerdict, plural, sentence, verdictShape } from "../words.ts";

/** A requirement is listed once for each of its scenarios. */
function countOfIds(results: readonly RequirementResult[]): number {
  return new Set(results.map(({ id }) => id)).size;
}

function headline({ requirements }: Evidence): string {
  const pairs = requirements.length;
  if (pairs === 0) return "Nothing was tested: the evidence holds no requirement.";
  const all = countOfIds(requirements);
  const violated = countOfIds(requirements.filter(({ verdict }) => verdict === "violated"));
  const never = neverExercised(requirements).length;
  if (never === all) return "No requirement was exercised by any run; nothing is known.";
  const tested = all - untested(requirements).length;
  const rest = silentWords(requirements, never, all - tested - never);
  if (violated > 0) return `${violated} of ${plural(all, "requirement")} violated.${rest}`;
  return `No violation found: ${tested === all ? "" : `${tested} of `}${plural(all, "requirement")} tested.${rest}`;
}

/** Requirements exercised nowhere or in corners only, and the pairs left without a random run. */
function silentWords(requirements: Evidence["requirements"], never: number, cornerOnly: number): string {
  const pairs = requirements.filter(({ verdict }) => verdict === "not_exercised").length;
  const nowhere =
    never === 0 ? "" : ` Exercised in no scenario, so not tested: ${plural(never, "requirement")}.`;
  if (pairs === 0) return "";
  const corners =
    cornerOnly === 0 ? "" : ` Exercised in corner runs only: ${plural(cornerOnly, "requirement")}.`;
  return `${nowhere}${corners} Not exercised by any random run: ${pairs} of ${requirements.length} pairs of requirement and scenario.`;
}

function unknown(evidence: Evidence, result: RequirementResult): Html {
  const index = evidence.requirements.indexOf(result);
  return html`<li><a href="#${slug("requirement", index)}">${name(result.id)}</a> was exercised in no scenario:
${name(sentence(result.says))} Nothing is known of it: ${whyNotExercised(result.pattern)}.</li>`;
}

function lowest(worst: WorstRun | undefined): string {
  return worst === undefined ? "" : `, lowest margin ${margin(worst.margin)}`;
}

function violation(evidence: Evidence, { result, index }: Placed): Html {
  const { corners, counterexample } = result;
  return html`<li><a href="#${slug("requirement", index)}">${name(result.id)}</a> on ${name(result.scenario)}:
${name(sentence(result.says))} ${plural(result.violations, "violation")} in ${plural(result.exercised, "random run")}${lowest(result.worst)};
${plural(corners.violations, "violation")} in ${plural(corners.exercised, "corner run")}${lowest(corners.worst)}.${
    counterexample === undefined
      ? undefined
      : html` Replay the smallest manoeuvre found: ${replayCommand(evidence, counterexample)}`
  }</li>`;
}

/** The answer, before anything else: one sentence with its shape, then what is violated and how to see it again. */
export function verdictSection(evidence: Evidence): Html {
  const overall = overallVerdict(evidence);
  const violated = byVerdict(evidence).filter(({ result }) => result.verdict === "violated");
  const never = neverExercised(evidence.requirements);
  return html`<section id="verdict" aria-labelledby="verdict-title">
<h2 id="verdict-title">Verdict</h2>
<p class="headline ${overall}">${verdictShape(overall)}<span>${headline(evidence)}</span></p>
<p>${plural(evidence.simulations, "random simulation")} of ${plural(evidence.scenarios.length, "scenario")},
${plural(evidence.runsPerScenario, "run")} each, all of the kind <em>tested</em>. Apart from these:
${plural(evidence.extraSimulations.corner, "corner run")} and
${plural(evidence.extraSimulations.shrink, "run")} spent on making counterexamples smaller.
Nothing here is proved or searched.</p>
${violated.length === 0 ? undefined : html`<ul class="violations">${violated.map((placed) => violation(evidence, placed))}</ul>`}
${never.length === 0 ? undefined : html`<ul class="untested">${never.map((result) => unknown(evidence, result))}</ul>`}
</section>`;
}
