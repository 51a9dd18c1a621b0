import { readdirSync, readFileSync } from "node:fs";
import { lowerSpec } from "../../generator/index.ts";
import type { ControllerPort } from "../../hil-sim/index.ts";
import { type LoopSpec, readLoopSpec } from "../../spec/index.ts";
import { compileController, type GeneratedController, portFromRuntime } from "../../verification/index.ts";

const FOLDER = "examples/skarn24/";
const NAME = "skarn24.yaml";

/** The text of the complete example's spec. */
export const exampleText = (): string => readFileSync(FOLDER + NAME, "utf8");

/** The complete example, or an edited text of it; throws with the first diagnostic when it has an error. */
export function exampleLoop(text = exampleText()): LoopSpec {
  const open = (path: string) => ({ file: path, text: readFileSync(FOLDER + path, "utf8") });
  const { spec, diagnostics } = readLoopSpec({ file: NAME, text }, open);
  if (spec === undefined)
    throw new Error(JSON.stringify(diagnostics.find((each) => each.severity === "error")));
  return spec;
}

/** The runtime as the example's controller, in double precision. */
export const runtimePort = (loop: LoopSpec): ControllerPort => portFromRuntime(lowerSpec(loop, ""));

/** The text of the runtime's files, by name. */
const runtimeText = (): Map<string, string> => {
  const names = readdirSync("runtime").filter((name) => name.endsWith(".ts"));
  return new Map(names.sort().map((name) => [name, readFileSync(`runtime/${name}`, "utf8")]));
};

/** The generated TypeScript of a loop's controller; throws when the generator refuses it. */
export function generatedController(loop: LoopSpec): GeneratedController {
  const { controller, refusals } = compileController(lowerSpec(loop, ""), runtimeText());
  if (controller === undefined) throw new Error(JSON.stringify(refusals[0]));
  return controller;
}
