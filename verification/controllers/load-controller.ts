import {
  type Compiled,
  compileProgram,
  generatedModule,
  javascriptOf,
  type Layout,
  type Lowered,
  layoutOf,
  loadJavaScript,
  printTypeScript,
} from "../../generator/index.ts";
import type { ControllerPort } from "../../hil-sim/index.ts";
import type { LoopSpec } from "../../spec/index.ts";
import { portFromModule } from "./module-port.ts";

/** Generated code ready to be loaded on any thread: plain data. */
export interface GeneratedController {
  readonly javascript: string;
  readonly layout: Layout;
}

export interface CompiledController {
  /** Absent when the generator refused something. */
  readonly controller?: GeneratedController;
  readonly refusals: Compiled["refusals"];
}

/** The spec's controller as generated TypeScript, its types removed. `runtime`: text of the runtime's files, by name. */
export function compileController(
  lowered: Lowered,
  runtime: ReadonlyMap<string, string>,
): CompiledController {
  const { program, refusals } = compileProgram({ runtime, lowered });
  if (program === undefined) return { refusals };
  return {
    controller: { javascript: javascriptOf(printTypeScript(program)), layout: layoutOf(program) },
    refusals,
  };
}

/** Loads generated code as the controller of a loop. */
export async function loadController(
  generated: GeneratedController,
  loop: LoopSpec,
): Promise<ControllerPort> {
  const module = generatedModule(generated.layout, await loadJavaScript(generated.javascript));
  const { step, guardStep, precision, target } = loop.controller;
  return portFromModule(module, {
    step: step.value,
    guardStep: guardStep.value,
    precision,
    targetReference: target.reference,
  });
}
