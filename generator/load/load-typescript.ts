import { compiler } from "../front/compiler.ts";
import type { GeneratedExports } from "../run/controller-module.ts";

/** Generated TypeScript without its types: what a worker thread can import without the compiler. */
export const javascriptOf = (text: string): string => {
  const { transpileModule, ModuleKind, ScriptTarget } = compiler();
  return transpileModule(text, {
    compilerOptions: { module: ModuleKind.ESNext, target: ScriptTarget.ES2022, removeComments: true },
  }).outputText;
};

/** Imports a module from its JavaScript text. Only ever text that this generator printed. */
export const loadJavaScript = async (javascript: string): Promise<GeneratedExports> =>
  (await import(
    `data:text/javascript;base64,${Buffer.from(javascript).toString("base64")}`
  )) as GeneratedExports;

export const loadTypeScript = (text: string): Promise<GeneratedExports> => loadJavaScript(javascriptOf(text));
