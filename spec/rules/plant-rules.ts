import type { Report } from "../diagnostics/report.ts";
import { RADIANS_PER_SECOND_PER_RPM } from "../quantities/rpm.ts";
import type { Value } from "../table/kind.ts";
import type { PLANT_BLOCK } from "../table/plant-table.ts";
import { short } from "./rule.ts";

export type HoledPlant = Value<typeof PLANT_BLOCK, "holed">;

/** Rules about a plant file that need several of its values. */
export function checkPlant(plant: HoledPlant, report: Report): void {
  checkHeads(plant, report);
  checkFlows(plant, report);
  checkTipSpeed(plant, report);
}

function checkHeads({ compressor }: HoledPlant, report: Report): void {
  const { peakHead: peak, shutoffHead: shutoff } = compressor ?? {};
  if (peak === undefined || shutoff === undefined || shutoff.value <= peak.value) return;
  report({
    code: "compressor-map-inverted",
    at: shutoff.at,
    message: `the head at zero flow (${shutoff.written}) is above the peak of the speed line (${peak.written})`,
    label: `at most ${peak.written}`,
    because: [{ at: peak.at, message: "the peak" }],
    fix: "shutoff_head: 0.42",
  });
}

const sum = (values: readonly { readonly value: number }[]): number =>
  values.reduce((all, { value }) => all + value, 0);

/** At the reference tip speed a speed line must run from its peak to a larger choke flow. */
function checkFlows({ compressor }: HoledPlant, report: Report): void {
  const { peakFlow: peak, chokeFlow: choke } = compressor ?? {};
  if (compressor === undefined || peak === undefined || choke === undefined || sum(choke) > sum(peak)) return;
  report({
    code: "compressor-map-inverted",
    at: compressor.places.choke_flow,
    message: `at the reference tip speed the choke flow (${short(sum(choke))} kg/s) is not above the flow of the peak (${short(sum(peak))} kg/s)`,
    label: `must be above ${short(sum(peak))} kg/s`,
    because: [{ at: compressor.places.peak_flow, message: "the flow of the peak" }],
    fix: "choke_flow: [0.14 kg/s, 0.33 kg/s, -0.02 kg/s]",
  });
}

/** At its speed limit the compressor must still be inside the stated validity. */
function checkTipSpeed({ turbo, compressor, validity }: HoledPlant, report: Report): void {
  const { tipRadius: radius } = compressor ?? {};
  const limit = turbo?.speedLimit;
  const most = validity?.tipSpeed?.high;
  if (radius === undefined || limit === undefined || most === undefined) return;
  const tip = radius.value * limit.value;
  if (tip <= most.value) return;
  report({
    code: "limit-outside-validity",
    at: limit.at,
    message: `at ${limit.written} the tip speed is ${short(tip)} m/s, beyond the validity of ${most.written}`,
    label: `at most ${short(most.value / radius.value / RADIANS_PER_SECOND_PER_RPM)} rpm`,
    because: [{ at: most.at, message: "the plant's validity" }],
    fix: "check radius, speed limit and validity against each other",
  });
}
