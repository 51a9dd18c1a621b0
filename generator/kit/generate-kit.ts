import { type LoopSpec, meaningText } from "../../spec/index.ts";
import { printC } from "../c/print-c.ts";
import { compileProgram } from "../compile-program.ts";
import type { Refusal } from "../front/refusals.ts";
import type { Program } from "../ir/program.ts";
import { lowerSpec } from "../lowering/lower-spec.ts";
import { printTypeScript } from "../typescript/print-typescript.ts";
import { printManifest } from "./manifest.ts";

export interface Kit {
  /** File names to text; empty when anything was refused. */
  readonly files: ReadonlyMap<string, string>;
  readonly program?: Program;
  readonly refusals: readonly Refusal[];
}

/** Every file of a compiled controller. */
export const kitFiles = (program: Program): ReadonlyMap<string, string> => {
  const files = new Map([...printC(program), [`${program.name}.ts`, printTypeScript(program)]]);
  return new Map([...files, ["manifest.json", printManifest(program, files)]]);
};

/** From a checked spec and the runtime's text to the files of the port kit. Pure: same input, same bytes. */
export const generateKit = (spec: LoopSpec, runtime: ReadonlyMap<string, string>): Kit => {
  const { program, refusals } = compileProgram({ runtime, lowered: lowerSpec(spec, meaningText(spec)) });
  return program === undefined
    ? { files: new Map(), refusals }
    : { files: kitFiles(program), program, refusals };
};
