import type { Report } from "../diagnostics/report.ts";
import type { CurveSpec, Quantity } from "../quantity.ts";
import { type Rule, type Seen, short, writtenAt } from "./rule.ts";

/** Feedback, feedforward and the valve's area. */
export const checkFeedback: Rule = (seen, report) => {
  checkAntiWindup(seen, report);
  checkDerivative(seen, report);
  checkGainAxes(seen, report);
  checkTrim(seen, report);
  checkSetpointWeight(seen, report);
  checkArea(seen, report);
  checkFeedforward(seen, report);
};

const usualAntiWindup = (feedback: { readonly schedule: string | undefined }): string => {
  const unit = feedback.schedule === "per_gauge_pressure" ? "%" : "kPa";
  return `anti_windup: { method: conditional, band: 10 ${unit}, still_below: 15 ${unit}/s }`;
};

function checkAntiWindup({ controller: { feedback } }: Seen, report: Report): void {
  if (feedback === undefined) return;
  const integralAt = writtenAt(feedback, "integral");
  const at = writtenAt(feedback, "anti_windup");
  if (integralAt !== undefined && at === undefined)
    report({
      code: "needs-another-key",
      at: integralAt,
      message: "`integral` needs `anti_windup`",
      label: "without it the integral grows while the valve is at its end stop",
      fix: usualAntiWindup(feedback),
    });
  if (integralAt !== undefined && at !== undefined && feedback.antiWindup?.method === "none")
    report({
      code: "integral-without-anti-windup",
      at,
      message: "the integral has no anti-windup",
      label: "it grows while the valve is at its end stop, then overshoots",
      because: [{ at: integralAt, message: "the integral" }],
      fix: usualAntiWindup(feedback),
    });
  if (integralAt === undefined && at !== undefined && feedback.antiWindup?.method !== "none")
    report({
      code: "no-effect",
      at,
      message: "`anti_windup` has no effect without `integral`",
      fix: "remove `anti_windup`, or add `integral`",
    });
}

function checkDerivative({ controller: { feedback } }: Seen, report: Report): void {
  const derivativeAt = writtenAt(feedback, "derivative");
  const filterAt = writtenAt(feedback, "derivative_filter");
  if (derivativeAt !== undefined && filterAt === undefined)
    report({
      code: "needs-another-key",
      at: derivativeAt,
      message: "`derivative` needs `derivative_filter`",
      label: "the measurement's noise would pass unfiltered",
      fix: "derivative_filter: 20 ms",
    });
  if (derivativeAt === undefined && filterAt !== undefined)
    report({
      code: "no-effect",
      at: filterAt,
      message: "`derivative_filter` has no effect without `derivative`",
      fix: "remove `derivative_filter`, or add `derivative`",
    });
}

const SCHEDULE_AXIS: Readonly<Record<string, string>> = {
  over_engine_speed: "engine_speed",
  over_target_pressure: "target_pressure",
};

function checkGainAxes({ controller: { feedback } }: Seen, report: Report): void {
  const schedule = feedback?.schedule;
  if (feedback === undefined || schedule === undefined) return;
  const axis = SCHEDULE_AXIS[schedule];
  for (const name of ["proportional", "integral", "derivative"] as const) {
    const gain = feedback[name];
    if (gain === undefined || !("axis" in gain) || gain.over === axis) continue;
    report({
      code: "gain-axis",
      at: gain.at,
      message: `\`${name}\` is a curve over \`${gain.over}\`, which does not fit \`schedule: ${schedule}\``,
      label:
        axis === undefined ? "expected a single number" : `expected a number or a curve over \`${axis}\``,
      because: [{ at: feedback.places.schedule, message: "the schedule" }],
      fix: `schedule: ${gain.over === "engine_speed" ? "over_engine_speed" : "over_target_pressure"}`,
    });
  }
}

function checkTrim({ controller: { feedback } }: Seen, report: Report): void {
  const trim = feedback?.trimLimits;
  if (feedback === undefined || trim === undefined) return;
  if (feedback.coordinate === "opening" && Math.max(-trim.low.value, trim.high.value) > 1) {
    report({
      code: "outside-actuator",
      at: feedback.places.trim_limits,
      message: `\`trim_limits\` ${trim.low.written} to ${trim.high.written} are more than the whole opening`,
      label: "within -100 % to 100 %",
      fix: "trim_limits: -20 % to 20 %",
    });
    return;
  }
  if (trim.low.value <= 0 && trim.high.value >= 0) return;
  report({
    code: "limits-exclude-zero",
    at: feedback.places.trim_limits,
    message: `\`trim_limits\` ${trim.low.written} to ${trim.high.written} exclude 0, where the integral starts`,
    label: "must include 0",
    fix: `trim_limits: ${feedback.coordinate === "opening" ? "-20 % to 20 %" : "-220 mm2 to 220 mm2"}`,
  });
}

const largest = (gain: Quantity | CurveSpec): number =>
  "axis" in gain ? Math.max(...gain.values) : gain.value;

/** kPa; only to judge the size of a gauge target. */
const USUAL_AMBIENT = 100;

/** With b below 1, P does not vanish on target; the integral must be able to make up for (1 - b) K. */
function checkSetpointWeight({ controller: { feedback, target } }: Seen, report: Report): void {
  const weightAt = writtenAt(feedback, "setpoint_weight");
  const { setpointWeight: weight, proportional, trimLimits, schedule } = feedback ?? {};
  if (
    weight === undefined ||
    weightAt === undefined ||
    proportional === undefined ||
    trimLimits === undefined
  )
    return;
  const relative = schedule === "per_gauge_pressure";
  const gauge = relative ? 1 : Math.max((target?.ceiling?.value ?? USUAL_AMBIENT) - USUAL_AMBIENT, 0);
  const needed = (1 - weight.value) * largest(proportional) * gauge;
  const room = Math.min(-trimLimits.low.value, trimLimits.high.value);
  if (needed <= room) return;
  report({
    code: "setpoint-weight-beyond-trim",
    at: weightAt,
    message: `a set-point weight of ${weight.written} leaves ${short(needed)} of proportional part on target, beyond the trim limits of ${short(room)}`,
    label: "the integral cannot make up for it",
    because: [{ at: trimLimits.low.at, message: "the trim limits" }],
    fix: "setpoint_weight: 100 %",
  });
}

function checkArea({ controller }: Seen, report: Report): void {
  const { feedback, wastegate } = controller;
  const areaAt = writtenAt(controller, "wastegate");
  if (feedback?.coordinate === "effective_area" && areaAt === undefined)
    report({
      code: "needs-another-key",
      at: feedback.places.coordinate,
      message: "`coordinate: effective_area` needs `wastegate: { effective_area: ... }`",
      label: "the valve's area over opening turns the result into an opening",
      fix: 'wastegate: { effective_area: { over: { opening: [0, 50, 100], unit: "%" }, unit: mm2, values: [4, 500, 630] } }',
    });
  if (feedback?.coordinate === "opening" && wastegate !== undefined)
    report({
      code: "no-effect",
      at: areaAt ?? wastegate.span,
      message: "`wastegate` has no effect under `coordinate: opening`",
      because: [{ at: feedback.places.coordinate, message: "the coordinate" }],
      fix: "remove `wastegate`, or use `coordinate: effective_area`",
    });
}

/** More area means less boost: the area that holds a higher ratio must not be larger. Only the first break is shown. */
function checkFeedforward({ controller: { feedforward }, at, text }: Seen, report: Report): void {
  if (feedforward === undefined) return;
  const { columns, values, rowsOver } = feedforward;
  const width = columns.length;
  const bad = values.findIndex((value, i) => i >= width && value > values[i - width]);
  if (bad === -1) return;
  const [row, column] = [Math.floor(bad / width), bad % width];
  const above = ["feedforward", "values", row - 1, column];
  const here = ["feedforward", "values", row, column];
  const axis = (index: number): string => text("feedforward", "rows", rowsOver, index);
  report({
    code: "feedforward-not-monotonic",
    at: at(...here),
    message: `the feedforward rises from ${text(...above)} to ${text(...here)} while the ${rowsOver.replaceAll("_", " ")} rises from ${axis(row - 1)} to ${axis(row)}`,
    label: `at most ${text(...above)}`,
    because: [{ at: at(...above), message: "the value of the row above" }],
    fix: "a higher boost needs a smaller opening: check the rows' order and the column",
  });
}
