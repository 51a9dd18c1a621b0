import { keyed } from "../keyed.ts";
import { TRACE_SIGNALS, type TraceSignal } from "../requirement-spec.ts";
import {
  absolutePressure,
  amount,
  block,
  flag,
  identifier,
  list,
  optional,
  quantity,
  ratioUnit,
  reference,
  required,
  sentence,
  standard,
  variants,
  words,
} from "./build.ts";
import type { KeySet, Limits, UnitChoice } from "./kind.ts";

const POSITIVE: Limits = { above: "0" };
const seconds = amount("s");
const ratio = ratioUnit();
const FRACTION: Limits = { above: "0", atMost: "100 %" };

interface BoundUnits {
  readonly level: UnitChoice;
  readonly distance: UnitChoice;
  readonly example: string;
}
/** How a bound on a trace signal is written, by the signal's unit. */
const BOUND_UNITS: Readonly<Record<(typeof TRACE_SIGNALS)[TraceSignal], BoundUnits>> = {
  "kPa abs": { level: absolutePressure("kPa"), distance: amount("kPa"), example: "245 kPa abs" },
  rpm: { level: amount("rpm"), distance: amount("rpm"), example: "165000 rpm" },
  ratio: { level: ratio, distance: ratio, example: "95 %" },
  "kg/s": { level: amount("kg/s"), distance: amount("kg/s"), example: "0.3 kg/s" },
  "N*m": { level: amount("N*m"), distance: amount("N*m"), example: "400 N*m" },
  flag: { level: amount("", ""), distance: amount("", ""), example: "0.5" },
};

const bounds = ({ level, distance, example }: BoundUnits) => ({
  above: optional(quantity(level), "the signal must be above this", example),
  below: optional(quantity(level), "the signal must be below this", example),
  scale: optional(
    quantity(distance, POSITIVE),
    "distance that counts as a margin of 1; absent: 10 % of the bound for pressures and speeds, else the size of the bound",
    example.replace(" abs", ""),
  ),
});

type Bounds = ReturnType<typeof bounds>;
type BySignal<T> = Record<TraceSignal, T>;

/** One set of keys for all signals of a unit, so that help and schema describe it once. */
const bySignal = <T>(make: (units: BoundUnits) => T): BySignal<T> => {
  const made = new Map(Object.entries(BOUND_UNITS).map(([unit, units]) => [unit, make(units)]));
  const entries = Object.entries(TRACE_SIGNALS).map(([signal, unit]) => [signal, made.get(unit)]);
  return Object.fromEntries(entries) as BySignal<T>;
};

export const COMPARISON = variants("signal", "a signal of the trace", bySignal<Bounds>(bounds));

const condition = optional(COMPARISON, "only while this holds", "{ signal: tripped, above: 0.5 }");
const WHILE = bySignal((units) => ({ ...bounds(units), while: condition }));

const PATTERNS = {
  stays: optional(
    variants("signal", "a signal of the trace", WHILE),
    "throughout the run the signal keeps its bounds",
    "{ signal: turbo_speed, below: 165000 rpm }",
  ),
  overshoot: optional(
    block({
      of: standard(words("target", "step"), "target", "what the excess is compared with"),
      at_most: required(quantity(ratio, FRACTION), "largest excess of boost over the wanted target", "4.5 %"),
    }),
    "boost above the wanted target after each rise",
    "{ of: target, at_most: 4.5 % }",
  ),
  settles: optional(
    block({
      band: required(quantity(ratio, FRACTION), "half width of the band, of the wanted target", "2.5 %"),
      within: required(quantity(seconds, POSITIVE), "time allowed", "1.2 s"),
      after: standard(
        words("command", "reached"),
        "command",
        "counted from the command, or from first reaching the band",
      ),
    }),
    "boost enters the band around the wanted target and stays",
    "{ band: 2.5 %, within: 1.2 s, after: command }",
  ),
  rises: optional(
    block({
      fraction: required(quantity(ratio, FRACTION), "share of the step", "95 %"),
      within: required(quantity(seconds, POSITIVE), "time allowed from the command", "4.5 s"),
    }),
    "boost covers a share of the step in time",
    "{ fraction: 95 %, within: 4.5 s }",
  ),
  steady_error: optional(
    block({
      at_most: required(
        quantity(ratio, FRACTION),
        "mean of boost minus wanted, of the wanted target",
        "0.4 %",
      ),
      over: required(quantity(seconds, POSITIVE), "last part of the run", "0.3 s"),
    }),
    "mean error at the end of the run",
    "{ at_most: 0.4 %, over: 0.3 s }",
  ),
  reacts: optional(
    block({
      when: required(
        COMPARISON,
        "each time this becomes true",
        "{ signal: turbo_speed_measured, above: 165000 rpm }",
      ),
      ...keyed(
        "then",
        required(COMPARISON, "this must become true", "{ signal: wastegate_command, above: 99 % }"),
      ),
      within: required(quantity(seconds, { atLeast: "0" }), "in this time", "2 ms"),
      lasting: standard(quantity(seconds, { atLeast: "0" }), "0 ms", "and stay true for this long"),
    }),
    "one event answers another",
    "{ when: { signal: tripped, above: 0.5 }, then: { signal: wastegate_command, above: 99 % }, within: 2 ms }",
  ),
} as const satisfies KeySet;
export const PATTERN_KEYS = Object.keys(PATTERNS) as readonly (keyof typeof PATTERNS)[];

export const REQUIREMENT_BLOCK = block(
  {
    id: required(identifier, "name of the requirement", "step_overshoot"),
    says: required(
      sentence,
      "the requirement as a sentence",
      "boost overshoots the target by no more than 4.5 %",
    ),
    scenarios: optional(list(reference), "names of scenarios; absent: all", "[tip_in]"),
    ...PATTERNS,
    only_if_reachable: optional(
      flag,
      "skip runs whose plant cannot reach the target; absent: true for overshoot, settles, rises and steady_error",
      "true",
    ),
  },
  { oneOf: PATTERN_KEYS },
);

export const REQUIREMENTS = list(REQUIREMENT_BLOCK);
