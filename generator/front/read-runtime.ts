import type { Constant, Enumeration, FunctionDefinition, Struct } from "../ir/program.ts";
import type { Lowered } from "../lowered.ts";
import { checkImports } from "./check-imports.ts";
import { readDeclarations } from "./read-declarations.ts";
import { readFunction } from "./read-function.ts";
import { readStructs } from "./read-structs.ts";
import type { Refusal } from "./refusals.ts";
import { parseSource, syntaxErrors } from "./source.ts";

/** The whole runtime as typed code, before a spec's structure is fixed in it. */
export interface RuntimeModule {
  readonly enumerations: readonly Enumeration[];
  readonly structs: readonly Struct[];
  readonly constants: readonly Constant[];
  readonly functions: readonly FunctionDefinition[];
}

/** Parses and types the runtime; names of files are kept as given. Reports every refusal it finds. */
export const readRuntime = (
  runtime: ReadonlyMap<string, string>,
  lowered: Lowered,
): { readonly module: RuntimeModule; readonly refusals: readonly Refusal[] } => {
  const files = [...runtime]
    .filter(([name]) => name.endsWith(".ts"))
    .map(([name, text]) => parseSource(name, text));
  const refusals: Refusal[] = files.flatMap(syntaxErrors);
  if (refusals.length > 0) {
    return { module: { enumerations: [], structs: [], constants: [], functions: [] }, refusals };
  }
  refusals.push(...checkImports(files));
  const declarations = readDeclarations(files, refusals);
  const functions = [...declarations.functions.values()].map((signature) =>
    readFunction(signature, declarations, lowered.arraySizes, refusals),
  );
  return {
    module: {
      enumerations: [...declarations.enumerations.values()],
      structs: readStructs(declarations, lowered),
      constants: [...declarations.constants.values()],
      functions,
    },
    refusals,
  };
};
