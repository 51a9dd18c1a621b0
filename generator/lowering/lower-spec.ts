import type { LoopSpec } from "../../spec/index.ts";
import type { Entry, Lowered, StructRole } from "../lowered.ts";
import { putGuard } from "./guard.ts";
import { putActuator, putFeedback, putFeedforward, putTarget } from "./loop.ts";
import { emptySheet, type Sheet } from "./sheet.ts";
import { putSignals } from "./signals.ts";
import { structureOf } from "./structure.ts";

export const CAUTIONS: readonly string[] = [
  "Prototype code, not a certified product: test it on the target and on a bench before any engine.",
  "Keep an independent mechanical or electrical overspeed and overboost protection.",
  "Local rules and a qualified engineer decide whether and how this may run.",
];

/** The structure holds both periods, but as numbers of the code; the header says them to the caller. */
const entriesOf = ({ step, guardStep }: LoopSpec["controller"]): readonly Entry[] => [
  {
    function: "initialise",
    printed: "init",
    kind: "init",
    when: "Call once before the first step of either task, and to start over; only while both tasks are stopped.",
  },
  {
    function: "stepBoost",
    kind: "step",
    when: "The slow step; the fast step goes first when both fall together. It must never interrupt the fast step.",
    periodS: step.value,
  },
  {
    function: "stepGuard",
    kind: "step",
    when: "The fast step; it may interrupt the slow step anywhere.",
    periodS: guardStep.value,
  },
];

const WHILE_REFUSED =
  "Until it is -1, hold the wastegate at its safe opening and limit engine torque as in fail-safe.";

const ROLES: Readonly<Record<string, StructRole>> = {
  Calibration: "calibration",
  SlowState: "state",
  FastState: "state",
  Exchange: "exchange",
  SlowInput: "input",
  FastInput: "input",
  SlowOutput: "output",
  FastOutput: "output",
};

function calibrationSheet(spec: LoopSpec): Sheet {
  const sheet = emptySheet();
  putSignals(sheet, spec.controller);
  putTarget(sheet, spec.controller);
  putFeedforward(sheet, spec.controller);
  putFeedback(sheet, spec.controller);
  putActuator(sheet, spec.controller);
  putGuard(sheet, spec.controller);
  return sheet;
}

/**
 * A checked spec made ready for code: structure, calibration values and what is known of each.
 * `meaning` is the canonical text of the controller (spec/meaning), hashed for the banner.
 */
export function lowerSpec(spec: LoopSpec, meaning: string): Lowered {
  const { controller } = spec;
  const sheet = calibrationSheet(spec);
  const structure = structureOf(controller);
  return {
    name: controller.name,
    description: controller.description,
    source: spec.file.split("/").pop() ?? spec.file,
    precision: controller.precision,
    structure: { ...structure },
    structureUnits: { stepS: "s", guardStepS: "s", accelerationSteps: "fast steps" },
    entries: entriesOf(controller),
    roles: ROLES,
    arraySizes: { ...sheet.sizes, "FastState.speedHistoryRpm": structure.accelerationSteps },
    calibration: sheet.values,
    calibrationInfo: sheet.info,
    meaning,
    whileRefused: WHILE_REFUSED,
    cautions: CAUTIONS,
  };
}
