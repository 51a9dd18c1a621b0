import type { Report } from "../diagnostics/report.ts";
import { RADIANS_PER_SECOND_PER_RPM } from "../quantities/rpm.ts";
import { startOf } from "../text/positions.ts";
import { type Rule, type Seen, short, writtenAt } from "./rule.ts";
import { speedQuantum } from "./signal-rules.ts";

/** The overspeed guard. */
export const checkGuard: Rule = (seen, report) => {
  checkParts(seen, report);
  checkFloor(seen, report);
  checkSensorRange(seen, report);
  checkMargin(seen, report);
  checkOrder(seen, report);
  checkTorque(seen, report);
  checkPlantLimit(seen, report);
};

const ONLY_WITH_GAIN = [
  "lead",
  "acceleration_window",
  "reference_speed",
  "integral_rate",
  "safe_pressure_ratio",
  "target_reduction",
  "target_release",
] as const;

function checkParts({ controller: { overspeedGuard: guard } }: Seen, report: Report): void {
  if (guard === undefined) return;
  const gainAt = writtenAt(guard, "gain");
  if (gainAt !== undefined && writtenAt(guard, "reference_speed") === undefined)
    report({
      code: "needs-another-key",
      at: gainAt,
      message: "`gain` needs `reference_speed`",
      label: "the floor rises with the speed above it",
      fix: "reference_speed: 158000 rpm",
    });
  if (gainAt === undefined && writtenAt(guard, "trip") === undefined)
    report({
      code: "guard-without-action",
      at: startOf(guard.span),
      message: "the overspeed guard has neither `gain` nor `trip`, so it never acts",
      fix: "trip: { after: 2 ms, torque: 40 %, release_below: 145000 rpm, release_after: 300 ms, accelerator_below: 10 %, or_after: 3 s }",
    });
  if (gainAt !== undefined) return;
  for (const key of ONLY_WITH_GAIN) {
    const at = writtenAt(guard, key);
    if (at !== undefined)
      report({
        code: "no-effect",
        at,
        message: `\`${key}\` has no effect without \`gain\``,
        fix: `remove \`${key}\`, or add \`gain\``,
      });
  }
}

/** Without feedforward the floor starts from a closed valve: measured on the invented engine A, the turbo passes its limit. */
function checkFloor({ controller }: Seen, report: Report): void {
  const gainAt = writtenAt(controller.overspeedGuard, "gain");
  if (gainAt === undefined || writtenAt(controller, "feedforward") !== undefined) return;
  report({
    code: "guard-floor-without-feedforward",
    at: gainAt,
    message:
      "the proportional guard has no feedforward to start from, so its floor starts from a closed valve",
    label: "the valve opens late",
    fix: "add `feedforward`, or rely on `trip` alone",
  });
}

/** A speed beyond the believed range still trips, but the proportional part never sees it. */
function checkSensorRange({ controller: { signals, overspeedGuard: guard } }: Seen, report: Report): void {
  const range = signals?.turboSpeed?.range;
  const limit = guard?.limit;
  if (range === undefined || limit === undefined || range.high.value > limit.value) return;
  report({
    code: "range-too-small",
    at: range.high.at,
    message: `\`turbo_speed\` is believed up to ${range.high.written}, which is not above the guard's limit of ${limit.written}`,
    label: `must be above ${limit.written}`,
    because: [{ at: limit.at, message: "the limit" }],
    fix: `range: ${range.low.written} to ${short(limit.value * 1.4)} rpm`,
  });
}

/** Between two guard steps speed goes on rising, and the sensor shows it only to its resolution. */
function checkMargin({ controller, plant }: Seen, report: Report): void {
  const { overspeedGuard: guard, signals } = controller;
  const period = controller.guardStep ?? controller.step;
  const { limit, margin } = guard ?? {};
  if (limit === undefined || margin === undefined || period === undefined) return;
  const rate = signals?.turboSpeed?.fault?.rateAbove;
  const quantum = plant === undefined ? 0 : speedQuantum(plant);
  const rise = rate === undefined ? 0 : rate.value * period.value;
  const room = limit.value * margin.value;
  if (quantum + rise === 0 || room >= quantum + rise) return;
  const least = Math.ceil(((quantum + rise) / limit.value) * 1000) / 10;
  report({
    code: "guard-margin-small",
    at: margin.at,
    message: `the margin of ${short(room)} rpm is smaller than the sensor's resolution of ${short(quantum)} rpm plus a rise of ${short(rise)} rpm in one guard step`,
    label: `at least ${least} %`,
    ...(rate === undefined ? {} : { because: [{ at: rate.at, message: "the fastest believable rise" }] }),
    fix: `margin: ${least} %`,
  });
}

/** reference < ceiling = limit (1 - margin), release < ceiling. */
function checkOrder({ controller: { overspeedGuard: guard } }: Seen, report: Report): void {
  const { limit, margin, referenceSpeed, trip } = guard ?? {};
  if (limit === undefined || margin === undefined) return;
  const ceiling = limit.value * (1 - margin.value);
  const because = [{ at: margin.at, message: `limit and margin put the ceiling at ${short(ceiling)} rpm` }];
  if (referenceSpeed !== undefined && trip !== undefined && referenceSpeed.value >= ceiling)
    report({
      code: "reference-above-ceiling",
      at: referenceSpeed.at,
      message: `the proportional guard starts at ${referenceSpeed.written}, where the trip already acts`,
      label: `below ${short(ceiling)} rpm`,
      because,
      fix: `reference_speed: ${short(ceiling * 0.98)} rpm`,
    });
  const release = trip?.releaseBelow;
  if (release !== undefined && release.value >= ceiling)
    report({
      code: "release-above-ceiling",
      at: release.at,
      message: `the trip is released below ${release.written}, where it acts again`,
      label: `below ${short(ceiling)} rpm`,
      because,
      fix: `release_below: ${short(ceiling * 0.9)} rpm`,
    });
}

function checkTorque({ controller: { overspeedGuard, failSafe } }: Seen, report: Report): void {
  for (const [name, block] of [
    ["the trip", overspeedGuard?.trip],
    ["fail-safe", failSafe],
  ] as const) {
    const at = writtenAt(block, "torque");
    const torque = block?.torque;
    if (at === undefined || torque === undefined || torque.value < 1) continue;
    report({
      code: "torque-not-limited",
      at,
      message: `the torque limit of ${name}, ${torque.written}, limits nothing`,
      label: "below 100 %",
      fix: "torque: 40 %",
    });
  }
}

function checkPlantLimit({ controller: { overspeedGuard: guard }, plant }: Seen, report: Report): void {
  const limit = guard?.limit;
  if (limit === undefined || plant === undefined) return;
  const built = plant.turbo.speedLimit / RADIANS_PER_SECOND_PER_RPM;
  const at = plant.places.get("turbo.speed_limit");
  if (limit.value <= built * (1 + 1e-9)) return;
  report({
    code: "limit-above-plant",
    at: limit.at,
    message: `the guard's limit of ${limit.written} is above the plant's ${short(built)} rpm`,
    label: `at most ${short(built)} rpm`,
    ...(at === undefined ? {} : { because: [{ at, message: "the turbo's limit in the plant file" }] }),
    fix: `limit: ${short(built)} rpm`,
  });
}
