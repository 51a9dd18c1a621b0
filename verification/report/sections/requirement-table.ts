import type { Evidence, RequirementResult } from "../../evidence.ts";
import { byVerdict, type Placed } from "../by-verdict.ts";
import { marginOverviewPicture } from "../charts/margin-overview-picture.ts";
import { pictureMarkup } from "../charts/picture.ts";
import { code, type Html, html, name, trusted } from "../html.ts";
import { margin, percentUp, whole } from "../numbers.ts";
import { slug } from "../slug.ts";
import { verdictMark } from "../words.ts";

const NONE = "\u2013";

function bound(result: RequirementResult): string {
  return result.exercised === 0 ? NONE : percentUp(result.violationProbabilityUpper95);
}

function worstMargin(worst: { readonly margin: number } | undefined): string {
  return worst === undefined ? NONE : margin(worst.margin);
}

function row({ result, index }: Placed, specFile: string): Html {
  const { corners, at } = result;
  return html`<tr class="${result.verdict}">
<th scope="row"><a href="#${slug("requirement", index)}">${name(result.id)}</a> <span class="on">on ${name(result.scenario)}</span>
<small>${name(result.says)}</small></th>
<td class="words">${verdictMark(result.verdict)}</td>
<td class="words">${result.verdict === "not_exercised" ? NONE : result.kind}</td>
<td>${worstMargin(result.worst)}</td>
<td>${whole(result.exercised)} of ${whole(result.runs)}</td>
<td>${whole(result.violations)}</td>
<td>${bound(result)}</td>
<td>${whole(corners.violations)} of ${whole(corners.exercised)}</td>
<td>${worstMargin(corners.worst)}</td>
<td class="words">${at.file === specFile ? undefined : name(`${at.file}:`)}${whole(at.line)}</td>
</tr>`;
}

const HEAD = [
  "requirement",
  "verdict",
  "kind",
  "worst margin",
  "random runs judged",
  "violations",
  "chance of a violation below (95 %)",
  "corner violations",
  "worst corner margin",
  "line",
];

const WORDS = new Set(["verdict", "kind", "line"]);

function overview(evidence: Evidence): Html | undefined {
  const picture = marginOverviewPicture(
    "margins",
    byVerdict(evidence).map(({ result }) => result),
  );
  if (picture === undefined) return undefined;
  return html`<figure id="margins-figure">
<div class="box" role="group" tabindex="0" aria-label="${picture.title}">${trusted(pictureMarkup(picture))}</div>
<figcaption>Margins of the random runs. Bar: 5th to 95th percentile; upright line: median; diamond: the worst random
run; cross: the worst corner run. Left of the broken line: violated. Margins above 1.5 stand at the right end. The
table of requirements above and the details below give the same values.</figcaption>
</figure>`;
}

/** Every requirement on every scenario: one row each. */
export function requirementTable(evidence: Evidence): Html {
  const rows = byVerdict(evidence).map((placed) => row(placed, evidence.controller.specFile));
  return html`<section id="requirements" aria-labelledby="requirements-title">
<h2 id="requirements-title">Requirements</h2>
<p>A margin of 1 is comfortable by the whole allowance, 0 is the edge, negative is a violation. Margins are rounded
down, bounds up. Lines are those of ${code(evidence.controller.specFile)}.</p>
<div class="box" role="group" tabindex="0" aria-label="Table of requirements">
<table class="requirements"><caption>Requirements, their verdicts and their margins</caption>
<thead><tr>${HEAD.map((words) => html`<th scope="col" class="${WORDS.has(words) ? "words" : "figures"}">${words}</th>`)}</tr></thead>
<tbody>${rows.length === 0 ? html`<tr><td colspan="${HEAD.length}">no requirement</td></tr>` : rows}</tbody></table></div>
${overview(evidence)}
</section>`;
}
