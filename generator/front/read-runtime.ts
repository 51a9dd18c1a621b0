import type { Constant, Enumeration, FunctionDefinition } from "../ir/program.ts";
import { checkImports } from "./check-imports.ts";
import type { DeclaredInterface } from "./declarations.ts";
import { readDeclarations } from "./read-declarations.ts";
import { readFunction } from "./read-function.ts";
import type { Refusal } from "./refusals.ts";
import { parseSource, syntaxErrors } from "./source.ts";

/** The whole runtime as typed code, before a spec's structure is fixed in it. */
export interface RuntimeModule {
  readonly enumerations: readonly Enumeration[];
  /** By name; they become structs once a spec gives their roles and the lengths of their arrays. */
  readonly interfaces: ReadonlyMap<string, DeclaredInterface>;
  readonly constants: readonly Constant[];
  readonly functions: readonly FunctionDefinition[];
}

/** Parses and types the runtime; names of files are kept as given. Reports every refusal it finds. */
export const readRuntime = (
  runtime: ReadonlyMap<string, string>,
): { readonly module: RuntimeModule; readonly refusals: readonly Refusal[] } => {
  const files = [...runtime]
    .filter(([name]) => name.endsWith(".ts"))
    .map(([name, text]) => parseSource(name, text));
  const refusals: Refusal[] = files.flatMap(syntaxErrors);
  if (refusals.length > 0) {
    return { module: { enumerations: [], interfaces: new Map(), constants: [], functions: [] }, refusals };
  }
  refusals.push(...checkImports(files));
  const declarations = readDeclarations(files, refusals);
  const functions = [...declarations.functions.values()].map((signature) =>
    readFunction(signature, declarations, refusals),
  );
  return {
    module: {
      enumerations: [...declarations.enumerations.values()],
      interfaces: declarations.interfaces,
      constants: [...declarations.constants.values()],
      functions,
    },
    refusals,
  };
};
