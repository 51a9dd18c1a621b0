import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { compileProgram, lowerSpec, type Precision, type Program } from "../../generator/index.ts";
import { type LoopSpec, readLoopSpec } from "../../spec/index.ts";
import { meaningText } from "../../spec/meaning.ts";
import { ROOT } from "../support/run-cli.ts";

/** Text of the runtime as the package ships it. */
export const runtimeText = (): ReadonlyMap<string, string> => {
  const folder = join(ROOT, "runtime");
  const names = readdirSync(folder).filter((name) => name.endsWith(".ts"));
  return new Map(names.sort().map((name) => [`runtime/${name}`, readFileSync(join(folder, name), "utf8")]));
};

/** Reads a spec that must be valid. */
export const readSpec = (text: string, file = "random.yaml"): LoopSpec => {
  const open = (path: string) => ({ file: path, text: readFileSync(join(ROOT, file, "..", path), "utf8") });
  const { spec, diagnostics } = readLoopSpec({ file, text }, open);
  if (spec === undefined) {
    const errors = diagnostics.map(
      ({ at, code, message }) => `${at.line}:${at.column}: ${message} (${code})`,
    );
    throw new Error(`the spec should be valid:\n${errors.join("\n")}\n${text}`);
  }
  return spec;
};

/** Compiles a spec that must compile. */
export const compileSpec = (
  spec: LoopSpec,
  runtime: ReadonlyMap<string, string>,
  precision?: Precision,
): Program => {
  const lowered = lowerSpec(spec, meaningText(spec));
  const { program, refusals } = compileProgram({
    runtime,
    lowered: { ...lowered, precision: precision ?? lowered.precision },
  });
  if (program === undefined) {
    const texts = refusals.map(({ at, code, message }) => `${at.file}:${at.line}: ${message} (${code})`);
    throw new Error(`the runtime should compile:\n${texts.join("\n")}`);
  }
  return program;
};

export const exampleSpec = (file: string): LoopSpec => readSpec(readFileSync(join(ROOT, file), "utf8"), file);
