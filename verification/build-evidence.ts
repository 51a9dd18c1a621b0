import type { ControllerSpec, LoopSpec, ScenarioSpec } from "../spec/index.ts";
import type { CampaignResult, ScenarioMargins } from "./campaign.ts";
import type {
  ControllerFacts,
  Limits,
  RequirementResult,
  ScenarioFacts,
  Verdict,
  WorstRun,
} from "./evidence.ts";
import { freeValues } from "./fix-scenario.ts";
import { inWrittenUnit } from "./free-units.ts";
import { drawOf } from "./run-batch.ts";
import { requirementsOf } from "./run-scenario.ts";
import { violationUpper95 } from "./statistics.ts";
import { type MarginSummary, summarise } from "./summarise.ts";

export function controllerFacts(loop: LoopSpec, form: ControllerFacts["form"]): ControllerFacts {
  const { controller } = loop;
  return {
    name: controller.name,
    description: controller.description,
    specFile: loop.file,
    precision: form === "runtime" ? "float64" : controller.precision,
    stepS: controller.step.value,
    guardStepS: controller.guardStep.value,
    form,
    limits: limitsOf(controller),
  };
}

export function limitsOf({ target, overspeedGuard }: ControllerSpec): Limits {
  const boostCeilingKpa = target.ceiling.value;
  if (overspeedGuard === undefined) return { boostCeilingKpa };
  const { limit, margin, proportional, trip } = overspeedGuard;
  return {
    boostCeilingKpa,
    turboSpeedLimitRpm: limit.value,
    ...(trip && { tripSpeedRpm: limit.value * (1 - margin.value) }),
    ...(proportional && { guardReferenceSpeedRpm: proportional.referenceSpeed.value }),
  };
}

export function scenarioFacts(scenario: ScenarioSpec, margins: ScenarioMargins, runs: number): ScenarioFacts {
  return {
    name: scenario.name,
    line: scenario.at.line,
    runs: margins.margins.length > 0 ? runs : 0,
    free: freeValues(scenario).map(({ name, free, base }) => ({
      name,
      low: inWrittenUnit(free.low, base, free.unit),
      high: inWrittenUnit(free.high, base, free.unit),
      unit: free.unit,
    })),
    plantScatter: scatterWords(scenario.plantScatter),
    leftValidity: margins.leftValidity,
    clamped: margins.clamped,
  };
}

function scatterWords(scatter: ScenarioSpec["plantScatter"]): string {
  if (scatter.kind === "set") return `set ${scatter.name}`;
  return scatter.kind === "none" ? "none" : `±${Number((100 * scatter.ratio).toPrecision(6))} %`;
}

/** One result for each requirement and scenario it applies to, in the order of the spec's requirements. */
export function requirementResults(
  loop: LoopSpec,
  campaign: CampaignResult,
  seed: number,
): RequirementResult[] {
  return loop.requirements.flatMap((requirement) =>
    loop.scenarios.flatMap((scenario, index) => {
      const column = requirementsOf(loop, scenario).indexOf(requirement);
      if (column < 0) return [];
      const random = summarise(campaign.random[index].margins[column]);
      const corner = summarise(campaign.corner[index].margins[column]);
      const worst = worstRun(loop, index, "random", seed, random);
      const worstCorner = worstRun(loop, index, "corner", seed, corner);
      const result: RequirementResult = {
        id: requirement.id,
        says: requirement.says,
        scenario: scenario.name,
        pattern: requirement.pattern.kind,
        verdict: verdictOf(random, corner),
        kind: "tested",
        runs: random.runs,
        exercised: random.exercised,
        violations: random.violations,
        ...(worst && { worst }),
        ...(random.margins && { margins: random.margins }),
        violationProbabilityUpper95: violationUpper95(random.violations, random.exercised),
        corners: {
          runs: corner.runs,
          exercised: corner.exercised,
          violations: corner.violations,
          ...(worstCorner && { worst: worstCorner }),
        },
        at: { file: requirement.at.file, line: requirement.at.line },
        scenarioLine: scenario.at.line,
      };
      return [result];
    }),
  );
}

/** A violation at a corner violates too, though it never enters the bound. */
function verdictOf(random: MarginSummary, corner: MarginSummary): Verdict {
  if (random.violations > 0 || corner.violations > 0) return "violated";
  return random.exercised > 0 ? "holds" : "not_exercised";
}

function worstRun(
  loop: LoopSpec,
  scenario: number,
  kind: "random" | "corner",
  seed: number,
  { worst }: MarginSummary,
): WorstRun | undefined {
  if (worst === undefined) return undefined;
  const draw = drawOf(loop, scenario, kind, seed, worst.run);
  const values = freeValues(loop.scenarios[scenario]).map(({ name, free, base }, index) => ({
    name,
    value: inWrittenUnit(draw.values[index], base, free.unit),
    unit: free.unit,
  }));
  return { run: worst.run, margin: worst.margin, values };
}
