import type { Report } from "../diagnostics/report.ts";
import { rational } from "../quantities/rational.ts";
import { type Rule, type Seen, writtenAt } from "./rule.ts";

/** Steps and the times that are measured in them. */
export const checkTiming: Rule = (seen, report) => {
  checkGuardStep(seen, report);
  checkDerivativeFilter(seen, report);
  checkTrackingTime(seen, report);
  checkLead(seen, report);
};

function checkGuardStep({ controller: { step, guardStep } }: Seen, report: Report): void {
  if (step === undefined || guardStep === undefined || guardStep.numerator === 0n) return;
  const ratio = rational(step.numerator * guardStep.denominator, step.denominator * guardStep.numerator);
  if (ratio.denominator === 1n) return;
  report({
    code: "step-not-divisible",
    at: guardStep.at,
    message: `\`guard_step\` ${guardStep.written} does not divide \`step\` ${step.written}`,
    label: `${step.written} is not a whole number of ${guardStep.written}`,
    because: [{ at: step.at, message: "the step of the boost loop" }],
    fix: `guard_step: ${step.written}`,
  });
}

function checkDerivativeFilter({ controller: { step, feedback } }: Seen, report: Report): void {
  const filter = feedback?.derivativeFilter;
  if (step === undefined || filter === undefined || feedback?.derivative === undefined) return;
  if (filter.value >= 2 * step.value) return;
  report({
    code: "derivative-filter-short",
    at: filter.at,
    message: `\`derivative_filter\` ${filter.written} is shorter than two steps of ${step.written}`,
    label: "noise passes nearly unfiltered",
    because: [{ at: step.at, message: "the step of the boost loop" }],
    fix: `derivative_filter: ${milliseconds(4 * step.value)}`,
  });
}

const milliseconds = (seconds: number): string => `${Number((seconds * 1000).toPrecision(6))} ms`;

function checkTrackingTime({ controller: { step, feedback } }: Seen, report: Report): void {
  const antiWindup = feedback?.antiWindup;
  if (step === undefined || antiWindup?.method !== "back_calculation") return;
  const { trackingTime } = antiWindup;
  if (trackingTime === undefined || trackingTime.value >= step.value) return;
  report({
    code: "tracking-time-short",
    at: trackingTime.at,
    message: `\`tracking_time\` ${trackingTime.written} is shorter than the step of ${step.written}`,
    label: "the integral would overcorrect in a single step",
    because: [{ at: step.at, message: "the step of the boost loop" }],
    fix: `tracking_time: ${milliseconds(20 * step.value)}`,
  });
}

/** Further ahead a straight line is no prediction: common practice, no source. */
const LONGEST_LEAD_S = 1;

/** A guard that looks ahead less far than its own period learns of an overspeed one step late. */
function checkLead({ controller }: Seen, report: Report): void {
  const guard = controller.overspeedGuard;
  const period = controller.guardStep ?? controller.step;
  const lead = guard?.lead;
  const at = writtenAt(guard, "lead");
  if (guard?.gain === undefined || period === undefined || lead === undefined || at === undefined) return;
  if (lead.value > LONGEST_LEAD_S)
    report({
      code: "lead-long",
      at,
      message: `the guard predicts turbo speed ${lead.written} ahead, along a straight line`,
      label: "at most 1 s",
      fix: "lead: 120 ms",
    });
  if (lead.value === 0 || period.value <= lead.value) return;
  report({
    code: "lead-shorter-than-step",
    at,
    message: `the guard runs every ${period.written} but looks only ${lead.written} ahead`,
    label: `shorter than the guard's step of ${period.written}`,
    because: [{ at: period.at, message: "the guard's step" }],
    fix: "lead: 120 ms",
  });
}
