import type { RuntimeModule } from "../front/read-runtime.ts";
import { readStructs } from "../front/read-structs.ts";
import { rounding } from "../interpret/operations.ts";
import type { Expression, Literal } from "../ir/expression.ts";
import type { Constant, FunctionDefinition, Program, Struct } from "../ir/program.ts";
import { eachExpressionOf, eachStatement } from "../ir/walk.ts";
import type { Lowered } from "../lowered.ts";
import { effectsOf } from "../validate/effects.ts";
import { constantParameters, reachable } from "./constant-parameters.ts";
import { countArrays } from "./count-arrays.ts";
import { foldFunction } from "./fold-function.ts";
import { inlineTrivial } from "./inline-trivial.ts";
import type { Known } from "./known.ts";
import { mapFunction } from "./map-function.ts";
import { prune } from "./prune.ts";
import { sizeArrays } from "./size-arrays.ts";
import { tidy } from "./tidy.ts";

/** Folding, tidying and pruning feed each other until nothing changes; the runtime settles in about four rounds. */
const MOST_ROUNDS = 20;

/** How much code there is: a round that leaves it alone twice has nothing left to do. */
const sizeOf = (functions: readonly FunctionDefinition[], structs: readonly Struct[]): number => {
  let size = functions.length;
  for (const definition of functions) {
    size += definition.parameters.length;
    eachStatement(definition.body, () => {
      size += 1;
    });
    eachExpressionOf(definition, () => {
      size += 1;
    });
  }
  return structs.reduce((sum, { fields }) => sum + fields.length, size);
};

/** Literals and constants rounded to the precision once, here: later passes never round a number again. */
const roundedNumbers = (
  definition: FunctionDefinition,
  round: (exact: number) => number,
): FunctionDefinition =>
  mapFunction(definition, (each): Expression => {
    const isReal = each.kind === "real" || (each.kind === "constant" && each.type.kind === "real");
    return isReal ? ({ ...each, value: round((each as Literal).value as number) } as Expression) : each;
  });

const roundedStructure = (lowered: Lowered, round: (exact: number) => number): Known["structure"] =>
  Object.fromEntries(
    Object.entries(lowered.structure).map(([name, value]) => [
      name,
      typeof value === "number" ? round(value) : value,
    ]),
  );

const usedConstants = (
  module: RuntimeModule,
  lowered: Lowered,
  functions: readonly FunctionDefinition[],
): readonly Constant[] => {
  const used = new Map<string, Constant>();
  for (const definition of functions) {
    eachExpressionOf(definition, (each) => {
      if (each.kind === "constant") {
        const declared = module.constants.find(({ name }) => name === each.name);
        const unit = lowered.structureUnits?.[each.name];
        used.set(each.name, {
          name: each.name,
          value: each.value,
          type: each.type,
          doc: declared?.doc ?? [],
          ...(unit === undefined ? {} : { unit }),
        });
      }
    });
  }
  return [...used.values()];
};

const usedEnumerations = (
  functions: readonly FunctionDefinition[],
  structs: readonly Struct[],
): ReadonlySet<string> => {
  const used = new Set<string>();
  const note = (type: { readonly kind: string; readonly name?: string } | undefined): void => {
    if (type?.kind === "enum" && type.name !== undefined) {
      used.add(type.name);
    }
  };
  for (const { type } of structs.flatMap(({ fields }) => fields)) {
    note(type);
  }
  for (const definition of functions) {
    note(definition.returns);
    for (const { type } of definition.parameters) {
      note(type);
    }
    eachStatement(definition.body, (each) => note(each.kind === "local" ? each.type : undefined));
    eachExpressionOf(definition, (each) => note(each.type));
  }
  return used;
};

const simplified = (
  functions: readonly FunctionDefinition[],
  known: Omit<Known, "locals">,
  entries: readonly string[],
): readonly FunctionDefinition[] => {
  const used = reachable(functions, entries);
  const constants = constantParameters(used);
  const folded = used.map((each) =>
    foldFunction({ ...known, locals: constants.get(each.name) ?? new Map() }, each),
  );
  const effects = effectsOf(folded);
  return inlineTrivial(folded.map((each) => tidy(each, effects)));
};

/** Simplified until two rounds have changed nothing: what one round makes constant, the next one folds. */
const settled = (
  start: readonly FunctionDefinition[],
  known: Omit<Known, "locals">,
  entries: readonly string[],
): readonly FunctionDefinition[] => {
  let functions = start;
  for (let round = 0, same = 0; round < MOST_ROUNDS && same < 2; round++) {
    const before = sizeOf(functions, []);
    functions = reachable(simplified(functions, known, entries), entries);
    same = sizeOf(functions, []) === before ? same + 1 : 0;
  }
  return functions;
};

export type Specialised = Pick<Program, "functions" | "structs" | "constants" | "enumerations">;

/** Fixes the spec's structure in the runtime: folds, drops what it does not choose, and what only that used. */
export const specialise = (module: RuntimeModule, lowered: Lowered): Specialised => {
  const round = rounding(lowered.precision);
  const known = { precision: lowered.precision, structure: roundedStructure(lowered, round) };
  const entries = lowered.entries.map((entry) => entry.function);
  let structs = readStructs(module.interfaces, lowered);
  let functions: readonly FunctionDefinition[] = reachable(module.functions, entries).map((each) =>
    sizeArrays(roundedNumbers(each, round), structs),
  );
  for (let round = 0, before = -1; round < MOST_ROUNDS && before !== sizeOf(functions, structs); round++) {
    functions = settled(functions, known, entries);
    before = sizeOf(functions, structs);
    ({ functions, structs } = prune({ functions, structs }, entries));
  }
  functions = countArrays(reachable(functions, entries));
  const enumerations = usedEnumerations(functions, structs);
  return {
    functions,
    structs,
    constants: usedConstants(module, lowered, functions),
    enumerations: module.enumerations.filter(({ name }) => enumerations.has(name)),
  };
};
