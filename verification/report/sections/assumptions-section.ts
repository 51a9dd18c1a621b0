import type { Evidence, ScenarioFacts } from "../../evidence.ts";
import { tableBox } from "../figure.ts";
import { code, type Html, html, name } from "../html.ts";
import { figure, whole } from "../numbers.ts";
import { KINDS_OF_EVIDENCE } from "../words.ts";

function freeValues(scenario: ScenarioFacts): Html {
  const values = scenario.free.map((free) =>
    free.low === free.high
      ? html`<li>${name(free.name)} ${figure(free.low)} ${name(free.unit)}</li>`
      : html`<li>${name(free.name)} ${figure(free.low)} to ${figure(free.high)} ${name(free.unit)}</li>`,
  );
  return values.length === 0 ? html`nothing` : html`<ul class="plain">${values}</ul>`;
}

function scenarioTable(evidence: Evidence): Html {
  return tableBox(
    {
      caption: "Scenarios and what was drawn in them, uniformly between the ends",
      head: [
        "scenario",
        "line",
        "runs",
        "drawn",
        "plant scatter",
        "left the plant's validity",
        "state clamped",
      ],
      rows: evidence.scenarios.map((scenario) => [
        name(scenario.name),
        whole(scenario.line),
        whole(scenario.runs),
        freeValues(scenario),
        name(scenario.plantScatter),
        whole(scenario.leftValidity),
        whole(scenario.clamped),
      ]),
    },
    "scenarios",
  );
}

function provenance(evidence: Evidence): Html {
  const { controller, plant, hashes, tool } = evidence;
  const facts: readonly (readonly [string, Html])[] = [
    ["seed", html`${String(evidence.seed)}`],
    ["tool", html`${tool.name} ${name(tool.version)}`],
    ["spec", html`${name(controller.specFile)}: ${name(controller.name)}. ${name(controller.description)}`],
    [
      "plant",
      html`${plant.file === undefined ? undefined : html`${name(plant.file)}: `}${name(plant.name)}. ${name(plant.description)}`,
    ],
    ["hash of the controller's meaning", html`<code class="hash">${hashes.controller}</code>`],
    ["hash of plant, scenarios and requirements", html`<code class="hash">${hashes.plantAndTests}</code>`],
  ];
  return html`<dl class="facts">${facts.map(([term, value]) => html`<dt>${term}</dt><dd>${value}</dd>`)}</dl>`;
}

/** What the evidence rests on, and what its words mean. */
export function assumptionsSection(evidence: Evidence): Html {
  return html`<section id="assumptions" aria-labelledby="assumptions-title">
<h2 id="assumptions-title">What was assumed</h2>
<ul>${evidence.assumptions.map((sentence) => html`<li>${name(sentence)}</li>`)}</ul>
${evidence.scenarios.length === 0 ? undefined : scenarioTable(evidence)}
<h3>The three kinds of evidence</h3>
<dl>${KINDS_OF_EVIDENCE.map(({ word, means }) => html`<dt>${word}</dt><dd>${means}</dd>`)}</dl>
<h3>What was run</h3>
${provenance(evidence)}
<p>The same spec, version and seed give this report again, to the byte:
${code(`spoolwright verify ${evidence.controller.specFile} --seed ${evidence.seed} --runs ${evidence.runsPerScenario}`)}</p>
</section>`;
}
