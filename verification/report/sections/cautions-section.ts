import type { Evidence } from "../../evidence.ts";
import { type Html, html, name } from "../html.ts";

/** Stands in every report, whatever the evidence says. */
const STANDING: readonly string[] = [
  "The plant is a model, not the engine: what holds here can fail on a real turbocharger. Do not run a controller " +
    "on an engine on the strength of this report alone.",
  "Random runs bound the probability of a violation under the stated distribution only.",
];

function list(sentences: readonly string[]): Html {
  return html`<ul>${sentences.map((sentence) => html`<li>${name(sentence)}</li>`)}</ul>`;
}

export function allCautions(evidence: Evidence): readonly string[] {
  return evidence.cautions.length === 0 ? STANDING : evidence.cautions;
}

/** Before the verdict, so that nobody reads the one without the other. */
export function cautionsAtTop(evidence: Evidence): Html {
  return html`<aside class="cautions" aria-label="Cautions"><h2>Before you rely on this</h2>
${list(allCautions(evidence))}</aside>`;
}

export function cautionsSection(evidence: Evidence): Html {
  return html`<section id="cautions" aria-labelledby="cautions-title">
<h2 id="cautions-title">Cautions</h2>${list(allCautions(evidence))}</section>`;
}
