import {
  amount,
  bareUnit,
  block,
  identifier,
  integer,
  list,
  optional,
  path,
  quantity,
  required,
  type Span,
  sentence,
  standard,
  type Value,
  words,
} from "../../spec/index.ts";

const LARGEST_WORD = "4294967295";

/** The table of counterexample files, in the words of the spec language. */
export const COUNTEREXAMPLE_FILE = block({
  spoolwright: required(integer(1, 1), "version of the language", "1"),
  counterexample: required(
    block({
      spec: required(path, "the spec, beside this file", "loop.yaml"),
      scenario: required(identifier, "the scenario that was run", "tip_in"),
      requirement: required(identifier, "the requirement that is violated", "overshoot"),
      says: optional(sentence, "the requirement as a sentence", "Boost overshoots by at most 4.5 %."),
      margin: required(quantity(bareUnit), "margin found; negative: violated", "-0.2"),
      controller_hash: required(sentence, "hash of what the controller's spec means", "ab12"),
      tests_hash: required(sentence, "hash of what plant, scenarios and requirements mean", "cd34"),
      values: standard(
        list(
          block({
            name: required(sentence, "a free value of the scenario", "engine_speed"),
            value: required(sentence, "its value", "4800 rpm"),
          }),
        ),
        "[]",
        "every free value of the scenario",
        "[{ name: engine_speed, value: 4800 rpm }]",
      ),
      plant_scatter: standard(
        list(
          block({
            parameter: required(sentence, "a parameter of the scenario's scatter", "turbineFlow"),
            share: required(quantity(bareUnit, { atLeast: "-1", atMost: "1" }), "share of its range", "-0.4"),
          }),
        ),
        "[]",
        "parameters off their nominal value",
        "[{ parameter: turbineFlow, share: -0.4 }]",
      ),
      noise: standard(words("on", "off"), "on", "the scenario's sensor noise"),
      noise_seed: required(
        quantity(bareUnit, { atLeast: "0", atMost: LARGEST_WORD }),
        "seeds the noise",
        "1",
      ),
      faults: standard(
        list(integer(1, 1000)),
        "[]",
        "which of the scenario's faults happen, by number",
        "[1]",
      ),
      ends_at: optional(quantity(amount("s"), { above: "0" }), "ends the run early", "2.5 s"),
    }),
    "a run that violates a requirement",
    "{ spec: loop.yaml, scenario: tip_in, requirement: overshoot, margin: -0.2 }",
  ),
});

export type ReadCounterexample = Value<typeof COUNTEREXAMPLE_FILE, "whole">["counterexample"];

/** A run that violates a requirement, as its file holds it. */
export interface Counterexample {
  /** Path of the spec as written: beside the file. */
  readonly spec: string;
  readonly scenario: string;
  readonly requirement: string;
  readonly says: string;
  readonly margin: number;
  readonly hashes: { readonly controller: string; readonly plantAndTests: string };
  readonly values: readonly WrittenValue[];
  readonly plantScatter: readonly { readonly parameter: string; readonly share: number; readonly at: Span }[];
  readonly noise: boolean;
  readonly noiseSeed: number;
  readonly faults: readonly number[];
  readonly endsAt?: number;
  /** Where each key's value stands in the file. */
  readonly places: Readonly<Record<string, Span>>;
}

export interface WrittenValue {
  readonly name: string;
  /** Number and unit, exact. */
  readonly written: string;
  readonly nameAt: Span;
  readonly at: Span;
}
