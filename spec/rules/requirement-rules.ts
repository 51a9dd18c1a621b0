import type { Report } from "../diagnostics/report.ts";
import type { Quantity } from "../quantity.ts";
import { nearestName, orList, quote } from "../read/suggest.ts";
import type { HoledLoop } from "../read-loop-spec.ts";
import type { Span } from "../span.ts";
import { startOf } from "../text/positions.ts";
import { type Controller, short, writtenAt } from "./rule.ts";

type Requirement = NonNullable<NonNullable<HoledLoop["requirements"]>[number]>;

/** Rules about the list of requirements. */
export function checkRequirements(read: HoledLoop, report: Report): void {
  const requirements = (read.requirements ?? []).filter((each) => each !== undefined);
  checkIds(requirements, report);
  checkExercised(read, requirements, report);
  for (const requirement of requirements) {
    checkScenarioNames(requirement, read, report);
    checkComparisons(requirement, report);
    checkSlew(requirement, read.controller, report);
  }
}

function checkIds(requirements: readonly Requirement[], report: Report): void {
  const first = new Map<string, Span>();
  for (const { id, places } of requirements) {
    if (id === undefined) continue;
    const before = first.get(id);
    if (before === undefined) first.set(id, places.id);
    else
      report({
        code: "duplicate-id",
        at: places.id,
        message: `the id ${quote(id)} is given twice`,
        because: [{ at: before, message: "the first one" }],
        fix: `id: ${id}_2`,
      });
  }
}

function checkExercised(read: HoledLoop, requirements: readonly Requirement[], report: Report): void {
  const [first] = requirements;
  if (first === undefined || read.scenarios === undefined || read.scenarios.length > 0) {
    if (first === undefined || writtenAt(read, "scenarios") !== undefined) return;
  }
  report({
    code: "requirement-without-scenario",
    at: startOf(first.span),
    message: "there are requirements, but no scenario that could exercise them",
    fix: "scenarios: { tip_in: { duration: 6 s, engine_speed: 4000 rpm, accelerator: 100 % } }",
  });
}

function checkScenarioNames({ scenarios, places }: Requirement, read: HoledLoop, report: Report): void {
  const known = (read.scenarios ?? []).map(({ name }) => name);
  if (scenarios?.length === 0)
    report({
      code: "requirement-without-scenario",
      at: places.scenarios,
      message: "the requirement's list of scenarios is empty",
      label: "leave the key out for all scenarios",
      fix: `scenarios: [${known[0] ?? "tip_in"}]`,
    });
  for (const reference of scenarios ?? []) {
    if (reference === undefined || known.includes(reference.name)) continue;
    const near = nearestName(reference.name, known);
    const label = near === undefined ? `known scenarios: ${orList(known)}` : `did you mean \`${near}\`?`;
    report({
      code: "unknown-scenario",
      at: reference.at,
      message: `there is no scenario ${quote(reference.name)}`,
      ...(known.length === 0 ? {} : { label }),
      ...(near === undefined ? {} : { fix: `scenarios: [${near}]` }),
    });
  }
}

interface Comparison {
  readonly above?: Quantity | undefined;
  readonly below?: Quantity | undefined;
  readonly span: Span;
  readonly places: Readonly<Record<string, Span>>;
}

function checkComparisons({ stays, reacts }: Requirement, report: Report): void {
  const all = [stays, stays?.while, reacts?.when, reacts?.then] as readonly (Comparison | undefined)[];
  for (const comparison of all) if (comparison !== undefined) checkComparison(comparison, report);
}

function checkComparison(comparison: Comparison, report: Report): void {
  const { above, below, span } = comparison;
  if (writtenAt(comparison, "above") === undefined && writtenAt(comparison, "below") === undefined)
    report({
      code: "needs-another-key",
      at: startOf(span),
      message: "a comparison needs `above` or `below`",
      fix: "below: 165000 rpm",
    });
  if (above === undefined || below === undefined || above.value < below.value) return;
  report({
    code: "wrong-order",
    at: below.at,
    message: `nothing is above ${above.written} and below ${below.written}`,
    label: `must be above ${above.written}`,
    because: [{ at: above.at, message: "the lower bound" }],
    fix: "swap the two bounds",
  });
}

/** kPa; a tip-in starts from about here. */
const NO_BOOST = 100;

/** A target that itself takes longer than the time allowed cannot be followed in time. */
function checkSlew(
  { settles, rises }: Requirement,
  controller: Controller | undefined,
  report: Report,
): void {
  const rise = controller?.target?.slew?.rise;
  const ceiling = controller?.target?.ceiling;
  const within = settles?.after === "reached" ? rises?.within : (settles?.within ?? rises?.within);
  if (rise === undefined || ceiling === undefined || within === undefined) return;
  const needed = (ceiling.value - NO_BOOST) / rise.value;
  if (needed <= within.value) return;
  report({
    code: "slew-too-slow",
    at: within.at,
    message: `the target's slew of ${rise.written} takes ${short(needed)} s from no boost to the ceiling, longer than ${within.written}`,
    label: "the target itself is late",
    because: [{ at: rise.at, message: "the slew" }],
    fix: `slew: { rise: ${Math.ceil(((ceiling.value - NO_BOOST) / within.value) * 2)} kPa/s }`,
  });
}
