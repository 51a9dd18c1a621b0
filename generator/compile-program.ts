import { createHash } from "node:crypto";
import { addCalibrationCheck } from "./calibration/check-function.ts";
import { parsedRuntime } from "./front/prepared-runtime.ts";
import { type Refusal, refusal } from "./front/refusals.ts";
import type { Program } from "./ir/program.ts";
import type { Lowered } from "./lowered.ts";
import { stemFrom } from "./print/identifiers.ts";
import { withSpecOrigins } from "./specialise/spec-origins.ts";
import { specialise } from "./specialise/specialise.ts";
import { findRecursion, validate } from "./validate/validate.ts";

export interface CompileInput {
  /** Text of every runtime file, by name. */
  readonly runtime: ReadonlyMap<string, string>;
  readonly lowered: Lowered;
}

export interface Compiled {
  /** Absent when anything was refused. */
  readonly program?: Program;
  readonly refusals: readonly Refusal[];
}

const hashOf = (text: string): string => createHash("sha256").update(text).digest("hex");

const missingEntries = (
  lowered: Lowered,
  functions: readonly { readonly name: string }[],
): readonly Refusal[] =>
  lowered.entries
    .filter((entry) => !functions.some(({ name }) => name === entry.function))
    .map((entry) =>
      refusal(
        "missing-entry",
        { file: "runtime", line: 1, column: 1, endLine: 1, endColumn: 1 },
        `there is no function \`${entry.function}\` in the runtime`,
      ),
    );

/**
 * The passes in their order: front (text to typed IR), specialise (the spec's structure fixed, the rest dropped),
 * validate, and the calibration's own check added. Pure; every refusal names a line of the runtime.
 */
export const compileProgram = ({ runtime, lowered }: CompileInput): Compiled => {
  const { module, refusals } = parsedRuntime(runtime);
  const early = [
    ...refusals,
    ...missingEntries(lowered, module.functions),
    ...findRecursion(module.functions),
  ];
  if (early.length > 0) {
    return { refusals: early };
  }
  const specialised = specialise(module, lowered);
  const calibrationStruct = specialised.structs.find(
    ({ name }) => lowered.roles[name] === "calibration",
  )?.name;
  const program: Program = {
    ...specialised,
    functions: specialised.functions.map((each) =>
      withSpecOrigins(each, calibrationStruct, lowered.calibrationInfo),
    ),
    name: stemFrom(lowered.name),
    description: lowered.description,
    source: lowered.source,
    meaning: hashOf(lowered.meaning).slice(0, 16),
    precision: lowered.precision,
    cautions: lowered.cautions,
    ...(lowered.whileRefused === undefined ? {} : { whileRefused: lowered.whileRefused }),
    entries: lowered.entries,
    ...(calibrationStruct === undefined ? {} : { calibrationStruct }),
    calibration: lowered.calibration,
    calibrationInfo: lowered.calibrationInfo,
  };
  const late = validate(program);
  return late.length > 0 ? { refusals: late } : { program: addCalibrationCheck(program), refusals: [] };
};
