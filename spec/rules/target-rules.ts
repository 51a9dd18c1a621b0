import type { Report } from "../diagnostics/report.ts";
import { startOf } from "../text/positions.ts";
import { type Rule, type Seen, short, writtenAt } from "./rule.ts";

/** The target and the actuator that follows it. */
export const checkTarget: Rule = (seen, report) => {
  checkCeiling(seen, report);
  checkOpenings(seen, report);
  checkSafeOpening(seen, report);
  checkPowerLoss(seen, report);
};

/** A column that lies above the ceiling throughout never shows its values. */
function checkCeiling({ controller: { target }, at }: Seen, report: Report): void {
  const boost = target?.boost;
  const bare = boost?.unit === "";
  const limit = bare ? target?.pressureRatioCeiling : target?.ceiling;
  if (boost === undefined || limit === undefined || boost.unit.endsWith("gauge")) return;
  const { columns, values, rows } = boost;
  const column = columns.findIndex((_, c) =>
    rows.every((__, r) => values[r * columns.length + c] > limit.value),
  );
  if (column === -1) return;
  const lowest = Math.min(...rows.map((_, r) => values[r * columns.length + column]));
  report({
    code: "target-above-ceiling",
    at: at("target", "boost", "columns", boost.columnsOver, column),
    message: `the whole column at ${columns[column]} ${boost.columnsUnit} is above the ceiling: at least ${short(lowest)} against ${limit.written}`,
    label: "none of its values can be reached",
    because: [{ at: limit.at, message: "the ceiling" }],
    fix: bare ? `pressure_ratio_ceiling: ${short(lowest)}` : `ceiling: ${short(lowest)} kPa abs`,
  });
}

function checkOpenings({ controller: { actuator } }: Seen, report: Report): void {
  const range = actuator?.opening;
  if (actuator === undefined || range === undefined) return;
  for (const [key, opening] of [
    ["safe_opening", actuator.safeOpening],
    ["rest_opening", actuator.restOpening],
  ] as const) {
    if (opening === undefined || (opening.value >= range.low.value && opening.value <= range.high.value))
      continue;
    report({
      code: "outside-actuator",
      at: opening.at === actuator.span ? startOf(opening.at) : opening.at,
      message: `\`${key}\` ${opening.written} is outside the actuator's range`,
      label: `${range.low.written} to ${range.high.written}`,
      because: [{ at: actuator.places.opening, message: "the actuator's range" }],
      fix: `${key}: ${opening.value > range.high.value ? range.high.written : range.low.written}`,
    });
  }
}

/** Share of the gate's opening that fail-safe and trip must reach at least: common practice, no source. */
const HALF_OPEN = 0.5;

/** The trip opens to the end of the range, fail-safe to the safe opening. */
function checkSafeOpening({ controller: { actuator, overspeedGuard } }: Seen, report: Report): void {
  const { opening: range, safeOpening } = actuator ?? {};
  if (actuator === undefined || range === undefined) return;
  const isNarrow = range.high.value < HALF_OPEN;
  if (isNarrow && overspeedGuard !== undefined) {
    report({
      code: "opening-below-half",
      at: actuator.places.opening,
      message: `the overspeed trip would open the wastegate only to ${range.high.written}`,
      label: "must reach at least 50 %",
      because: [{ at: startOf(overspeedGuard.span), message: "the overspeed guard" }],
      fix: `opening: ${range.low.written} to 100 %`,
    });
    return;
  }
  const at = writtenAt(actuator, "safe_opening");
  if (safeOpening === undefined || at === undefined || safeOpening.value >= HALF_OPEN) return;
  report({
    code: "safe-opening-below-half",
    at,
    message: `fail-safe opens the wastegate only to ${safeOpening.written}`,
    label: "boost may remain",
    fix: `safe_opening: ${isNarrow ? range.high.written : "100 %"}`,
  });
}

function checkPowerLoss({ controller: { actuator } }: Seen, report: Report): void {
  if (actuator?.onPowerLoss !== "closed") return;
  report({
    code: "closes-without-power",
    at: actuator.places.on_power_loss,
    message: "without power the wastegate closes, so boost and turbo speed rise unchecked",
    label: "the safe side is `open`",
    fix: "on_power_loss: open",
  });
}
