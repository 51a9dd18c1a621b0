import type { Evidence, RequirementResult, WorstRun } from "../../evidence.ts";
import { byVerdict } from "../by-verdict.ts";
import { binsOf, histogramPicture } from "../charts/histogram-picture.ts";
import { figureBox, tableBox, type ValueTable } from "../figure.ts";
import { code, type Html, html, name } from "../html.ts";
import { figure, margin, whole } from "../numbers.ts";
import { replayCommand } from "../replay-command.ts";
import { slug } from "../slug.ts";
import { cornerSentence, sentence, testedSentence, verdictMark } from "../words.ts";

function traceLink(evidence: Evidence, worst: WorstRun): Html | undefined {
  if (worst.trace === undefined || evidence.traces[worst.trace] === undefined) return undefined;
  return html`; <a href="#${slug("run", worst.trace)}">its charts</a>`;
}

function worstRun(evidence: Evidence, title: string, worst: WorstRun | undefined): Html | undefined {
  if (worst === undefined) return undefined;
  const table: ValueTable = {
    caption: `Inputs of the ${title}, run ${worst.run}`,
    head: ["input", "value", "unit"],
    rows: worst.values.map((value) => [name(value.name), figure(value.value, 6), name(value.unit)]),
  };
  return html`<p>The ${title} is number ${whole(worst.run)}, with a margin of ${margin(worst.margin)}${traceLink(evidence, worst)}.</p>
${worst.values.length === 0 ? undefined : tableBox(table, "inputs")}`;
}

function spread(result: RequirementResult, index: number): Html | undefined {
  const { margins } = result;
  if (margins === undefined) return undefined;
  const title = `Margins of ${result.id} on ${result.scenario}`;
  const { least, p05, median, p95, most } = margins.quantiles;
  const filled = binsOf(margins.histogram).filter((bin) => bin.count !== 0);
  const table: ValueTable = {
    caption: `${title}: random runs in each bin that is not empty`,
    head: ["margin from", "to", "runs"],
    rows: filled.map((bin) => [figure(bin.low), figure(bin.high), whole(bin.count)]),
  };
  const caption = html`Margins of ${plural(result.exercised)}: least ${margin(least)}, 5th percentile ${margin(p05)},
median ${margin(median)}, 95th percentile ${margin(p95)}, most ${margin(most)}. Values beyond the ends stand in the
outer bins.`;
  return figureBox(histogramPicture(slug("histogram", index), title, margins), caption, table);
}

function plural(runs: number): string {
  return `${whole(runs)} random ${runs === 1 ? "run" : "runs"}`;
}

function counterexample(evidence: Evidence, file: string | undefined): Html | undefined {
  return file === undefined
    ? undefined
    : html`<p>Smallest manoeuvre found that violates it, again: ${replayCommand(evidence, file)}</p>`;
}

function detail(evidence: Evidence, result: RequirementResult, index: number): Html {
  const id = slug("requirement", index);
  return html`<article id="${id}" aria-labelledby="${id}-title">
<h3 id="${id}-title">${name(result.id)} <span class="on">on ${name(result.scenario)}</span></h3>
<p>${verdictMark(result.verdict)} ${name(sentence(result.says))}</p>
<p>${testedSentence(result)} ${cornerSentence(result)}</p>
<p class="source">Pattern ${code(result.pattern)}, written at ${name(`${result.at.file}:${result.at.line}`)}; the
scenario at line ${result.scenarioLine}.</p>
${counterexample(evidence, result.counterexample)}
<div class="pair"><div>${worstRun(evidence, "worst random run", result.worst)}
${worstRun(evidence, "worst corner run", result.corners.worst)}</div>
<div>${spread(result, index)}</div></div>
</article>`;
}

/** Behind each row of the table: what was found, the worst inputs and the spread of the margins. */
export function requirementDetails(evidence: Evidence): Html | undefined {
  if (evidence.requirements.length === 0) return undefined;
  return html`<section id="details" aria-labelledby="details-title">
<h2 id="details-title">Each requirement</h2>
${byVerdict(evidence).map(({ result, index }) => detail(evidence, result, index))}</section>`;
}
