import type { Evidence, RequirementResult, Verdict } from "../evidence.ts";
import { untested, whyNotExercised } from "../not-exercised.ts";
import { type Html, html, trusted } from "./html.ts";
import { percentUp, whole } from "./numbers.ts";

export const VERDICT_WORDS: Readonly<Record<Verdict, string>> = {
  holds: "holds",
  violated: "violated",
  not_exercised: "not exercised",
};

/** Shapes beside the words: a tick in a ring, a cross in a filled square, a dash in a broken ring. */
const VERDICT_SHAPES: Readonly<Record<Verdict, string>> = {
  holds: '<circle cx="8" cy="8" r="6.5" class="open"/><path class="stroke" d="M4.8 8.3l2.2 2.3 4.2-5"/>',
  violated: '<path class="solid" d="M1 1h14v14H1z"/><path class="knock" d="M4.5 4.5l7 7m0-7l-7 7"/>',
  not_exercised:
    '<circle cx="8" cy="8" r="6.5" class="open" stroke-dasharray="2.5 2"/><path class="stroke" d="M5 8h6"/>',
};

export function verdictShape(verdict: Verdict): Html {
  return trusted(
    `<svg class="shape" viewBox="0 0 16 16" aria-hidden="true">${VERDICT_SHAPES[verdict]}</svg>`,
  );
}

export function verdictMark(verdict: Verdict): Html {
  const word = VERDICT_WORDS[verdict] ?? "not known";
  return html`<span class="verdict ${verdict}">${verdictShape(verdict)} ${word}</span>`;
}

/** The worst over all requirements: one that was not tested keeps the whole from holding. */
export function overallVerdict(evidence: Evidence): Verdict {
  const verdicts = new Set(evidence.requirements.map(({ verdict }) => verdict));
  if (verdicts.has("violated")) return "violated";
  return verdicts.has("holds") && untested(evidence.requirements).length === 0 ? "holds" : "not_exercised";
}

export function plural(count: number, one: string, many = `${one}s`): string {
  return `${whole(count)} ${count === 1 ? one : many}`;
}

/** The text as a sentence of its own. */
export function sentence(text: string): string {
  return /[.!?]\s*$/.test(text) ? text : `${text}.`;
}

/** One sentence: what was done and what came of it. Never more than the kind of evidence carries. */
export function testedSentence(result: RequirementResult): string {
  if (result.exercised === 0) {
    return (
      `Not tested: none of ${plural(result.runs, "independent random run")} exercised it, so they show nothing: ` +
      `${whyNotExercised(result.pattern)}.`
    );
  }
  const found = result.violations === 0 ? "no violation" : plural(result.violations, "violation");
  const bound = percentUp(result.violationProbabilityUpper95);
  return (
    `Tested in ${plural(result.runs, "independent random run")}, exercised in ${whole(result.exercised)}: ${found}. ` +
    `With 95 % confidence a run drawn from the same distribution violates it with a probability below ${bound}.`
  );
}

export function cornerSentence({ corners }: RequirementResult): string | undefined {
  if (corners.runs === 0) return undefined;
  const found = corners.violations === 0 ? "no violation" : plural(corners.violations, "violation");
  return (
    `Apart from these, ${plural(corners.runs, "corner run")} at the ends of the ranges ` +
    `(exercised in ${whole(corners.exercised)}): ${found}; they do not enter the bound.`
  );
}

export const KINDS_OF_EVIDENCE: readonly { readonly word: string; readonly means: string }[] = [
  {
    word: "tested",
    means:
      "so many closed-loop runs were drawn at random from the stated distribution and simulated. A bound holds for " +
      "further runs of this distribution on this plant model, with the stated confidence, and for nothing else.",
  },
  {
    word: "searched",
    means:
      "an optimiser looked for the worst case. It gives the worst case found; that none was found does not show that " +
      "there is none.",
  },
  {
    word: "proved",
    means:
      "shown by range analysis of the generated code for every input. It says nothing about the closed loop.",
  },
];
