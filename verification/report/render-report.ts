import type { Evidence } from "../evidence.ts";
import { type Html, html, name } from "./html.ts";
import { whole } from "./numbers.ts";
import { page } from "./page.ts";
import type { ReportContext } from "./report-context.ts";
import { assumptionsSection } from "./sections/assumptions-section.ts";
import { calibrationSection } from "./sections/calibration-section.ts";
import { cautionsAtTop, cautionsSection } from "./sections/cautions-section.ts";
import { codeSection } from "./sections/code-section.ts";
import { requirementDetails } from "./sections/requirement-details.ts";
import { requirementTable } from "./sections/requirement-table.ts";
import { verdictSection } from "./sections/verdict-section.ts";
import { worstRuns } from "./sections/worst-runs.ts";

const CONTENTS: readonly (readonly [string, string])[] = [
  ["verdict", "Verdict"],
  ["requirements", "Requirements"],
  ["details", "Each requirement"],
  ["runs", "Worst runs"],
  ["code", "Generated code"],
  ["calibration", "Calibration"],
  ["assumptions", "What was assumed"],
  ["cautions", "Cautions"],
];

function header(evidence: Evidence): Html {
  const { controller, plant, tool } = evidence;
  return html`<header>
<p class="seed"><b>Seed ${String(evidence.seed)}</b>, ${whole(evidence.runsPerScenario)} runs per scenario,
${tool.name} ${name(tool.version)}</p>
<h1>Evidence for the boost controller ${name(controller.name)}</h1>
<p class="lead">${name(controller.specFile)}, tested on the plant model ${name(plant.name)}${
    plant.file === undefined ? undefined : html` (${name(plant.file)})`
  }</p>
${cautionsAtTop(evidence)}
<nav aria-label="Contents"><ol>${CONTENTS.filter(
    ([id]) => id !== "details" || evidence.requirements.length > 0,
  ).map(([id, title]) => html`<li><a href="#${id}">${title}</a></li>`)}</ol></nav>
</header>`;
}

/**
 * The report as one self-contained HTML page: complete without script, for screen and print. The same evidence
 * and context give the same bytes. Every text of the evidence is escaped.
 */
export function renderReport(evidence: Evidence, context: ReportContext = {}): string {
  const body = html`${header(evidence)}
<main>
${verdictSection(evidence)}
${requirementTable(evidence)}
${requirementDetails(evidence)}
${worstRuns(evidence)}
${codeSection(evidence, context)}
${calibrationSection(context)}
${assumptionsSection(evidence)}
${cautionsSection(evidence)}
</main>
<footer></footer>`;
  return page(`Seed ${evidence.seed}: evidence for ${evidence.controller.name}`, body);
}
