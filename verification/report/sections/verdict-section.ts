import type { Evidence, RequirementResult, WorstRun } from "../../evidence.ts";
import { byVerdict, type Placed } from "../by-verdict.ts";
import { type Html, html, name } from "../html.ts";
import { margin } from "../numbers.ts";
import { replayCommand } from "../replay-command.ts";
import { slug } from "../slug.ts";
import { count, overallVerdict, plural, sentence, verdictShape } from "../words.ts";

/** A requirement is listed once for each of its scenarios. */
function countOfIds(results: readonly RequirementResult[]): number {
  return new Set(results.map(({ id }) => id)).size;
}

function headline(evidence: Evidence): string {
  const pairs = evidence.requirements.length;
  if (pairs === 0) return "Nothing was tested: the evidence holds no requirement.";
  const all = countOfIds(evidence.requirements);
  const violated = countOfIds(evidence.requirements.filter(({ verdict }) => verdict === "violated"));
  const silent = count(evidence, "not_exercised");
  const rest =
    silent === 0 ? "" : ` Not exercised by any run: ${silent} of ${pairs} pairs of requirement and scenario.`;
  if (violated > 0) return `${violated} of ${plural(all, "requirement")} violated.${rest}`;
  if (silent === pairs) return "No requirement was exercised by any run; nothing is known.";
  return `No violation found: ${plural(all, "requirement")} tested.${rest}`;
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
  return html`<section id="verdict" aria-labelledby="verdict-title">
<h2 id="verdict-title">Verdict</h2>
<p class="headline ${overall}">${verdictShape(overall)}<span>${headline(evidence)}</span></p>
<p>${plural(evidence.simulations, "random simulation")} of ${plural(evidence.scenarios.length, "scenario")},
${plural(evidence.runsPerScenario, "run")} each, all of the kind <em>tested</em>. Apart from these:
${plural(evidence.extraSimulations.corner, "corner run")} and
${plural(evidence.extraSimulations.shrink, "run")} spent on making counterexamples smaller.
Nothing here is proved or searched.</p>
${violated.length === 0 ? undefined : html`<ul class="violations">${violated.map((placed) => violation(evidence, placed))}</ul>`}
</section>`;
}
