import type { Explanation } from "../explanation.ts";

/** Keys, shapes, words and files. */
export const STRUCTURE_CODES = {
  "unknown-key": {
    severity: "error",
    cause:
      "A block has a key that the language does not know. The nearest known key is offered when it is close.",
    example: "feedback:\n  proportinal: 1481 mm2",
    fix: "Correct the spelling, or remove the key.",
  },
  "missing-key": {
    severity: "error",
    cause: "A block lacks a key that has no default.",
    example: "controller:\n  name: boost      # and no step",
    fix: "Add the key; the message has a line to paste.",
  },
  "one-of": {
    severity: "error",
    cause: "A block needs exactly one of several keys, and has none or more than one.",
    example: "- { id: a, says: b, overshoot: { at_most: 4 % }, settles: { band: 2 %, within: 1 s } }",
    fix: "Split it: one requirement, one meaning.",
  },
  "not-yet-supported": {
    severity: "error",
    cause:
      "The key belongs to the design of the language but has no effect in this version. Accepting it would mislead.",
    example: "overspeed_guard:\n  margin_without_sensor: 7 %",
    fix: "Remove the key for now.",
  },
  "wrong-type": {
    severity: "error",
    cause: "A list stands where a single value belongs, or the like.",
    example: "step: [5 ms]",
    fix: "Write the shape that the message names.",
  },
  "missing-value": {
    severity: "error",
    cause: "Nothing follows the colon.",
    example: "step:",
    fix: "Write a value, or remove the key to get its default.",
  },
  "unknown-axis": {
    severity: "error",
    cause: "A curve or table is given over a quantity that it cannot depend on, or over two at once.",
    example: "over: { gear: [1, 2, 3] }",
    fix: "Use one of the axes that the message names.",
  },
  "wrong-table-size": {
    severity: "error",
    cause: "The number of values does not fit the axis they belong to.",
    example: 'over: { opening: [0, 50, 100], unit: "%" }\nvalues: [4, 300]',
    fix: "Give one value for each point of the axis; in a table one row for each row point.",
  },
  "list-too-long": {
    severity: "error",
    cause: "A list has more than 64 values. Tables end up in the memory of a control unit.",
    example: "values: [0, 1, 2, ... 100]",
    fix: "Use fewer points; values in between are interpolated.",
  },
  "not-increasing": {
    severity: "error",
    cause: "The points of an axis, or the wastegate's area over opening, must rise from value to value.",
    example: "columns: { engine_speed: [2000, 4000, 3000], unit: rpm }",
    fix: "Sort the values, and the rows or columns of the table with them.",
  },
  "bad-name": {
    severity: "error",
    cause: "A name becomes an identifier in generated code: a small letter, then small letters, digits or _.",
    example: "name: 2nd boost loop",
    fix: "Write, for example, `second_boost_loop`.",
  },
  "bad-text": {
    severity: "error",
    cause: "A sentence is longer than 400 characters or has hidden control characters.",
    example: 'description: "boost\\u202eloop"',
    fix: "Remove the hidden characters, or shorten the sentence.",
  },
  "unknown-word": {
    severity: "error",
    cause: "A key takes one of a few words, and this is another.",
    example: "precision: double",
    fix: "Use one of the words that the message names.",
  },
  "unknown-scenario": {
    severity: "error",
    cause: "A requirement names a scenario that the file does not have, so it would never be tested there.",
    example: "scenarios: [tip_inn]",
    fix: "Correct the name, or add the scenario.",
  },
  "duplicate-id": {
    severity: "error",
    cause: "Two requirements have the same id, so evidence could not tell them apart.",
    example: "- { id: overshoot, ... }\n- { id: overshoot, ... }",
    fix: "Give each requirement its own id.",
  },
  "plant-path-outside": {
    severity: "error",
    cause: "The plant file must stand in the spec's folder or below it: no absolute path, no `..`.",
    example: "plant: ../other/engine.yaml",
    fix: "Copy the plant file beside the spec: `plant: ./engine.plant.yaml`.",
  },
  "plant-file-missing": {
    severity: "error",
    cause: "The plant file that the spec names is not there or cannot be read.",
    example: "plant: ./skarn42.plant.yaml",
    fix: "Correct the path; it is relative to the spec's own folder.",
  },
} as const satisfies Record<string, Explanation>;
