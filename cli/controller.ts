import { lowerSpec } from "../generator/index.ts";
import { type LoopSpec, meaningText } from "../spec/index.ts";
import { compileController, type GeneratedController } from "../verification/index.ts";
import { runtimeText } from "./runtime-text.ts";

/** The spec's controller as generated TypeScript, ready to be loaded. A checked spec must compile; else it is our fault. */
export function generatedController(loop: LoopSpec): GeneratedController {
  const { controller, refusals } = compileController(lowerSpec(loop, meaningText(loop)), runtimeText());
  if (controller !== undefined) return controller;
  const lines = refusals.map(({ code, at, message }) => `${at.file}:${at.line}: ${message} (${code})`);
  throw new Error(`the generator refused its own runtime\n  ${lines.join("\n  ")}`);
}
