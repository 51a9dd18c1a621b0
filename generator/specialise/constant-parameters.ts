import type { Expression } from "../ir/expression.ts";
import { isLiteral } from "../ir/expression.ts";
import type { FunctionDefinition } from "../ir/program.ts";
import { eachCallOf } from "../ir/walk.ts";
import { constantValue } from "./known.ts";

/** Functions that the entries reach, directly or not, those called first before their callers. */
export const reachable = (
  functions: readonly FunctionDefinition[],
  entries: readonly string[],
): readonly FunctionDefinition[] => {
  const byName = new Map(functions.map((each) => [each.name, each]));
  const done = new Map<string, FunctionDefinition>();
  const visit = (name: string): void => {
    const definition = byName.get(name);
    if (definition === undefined || done.has(name)) {
      return;
    }
    eachCallOf(definition, (call) => visit(call.function));
    done.set(name, definition);
  };
  entries.forEach(visit);
  return [...done.values()];
};

/**
 * Parameters that get the same Flag, Count or member in every call: constants of the function, by function name. The
 * parameter itself stays until unused parameters are dropped.
 */
export const constantParameters = (
  functions: readonly FunctionDefinition[],
): ReadonlyMap<string, ReadonlyMap<string, Expression>> => {
  const seen = new Map<string, Map<string, Expression | undefined>>();
  const byName = new Map(functions.map((each) => [each.name, each]));
  for (const caller of functions) {
    eachCallOf(caller, (call) => {
      const constants = seen.get(call.function) ?? new Map<string, Expression | undefined>();
      seen.set(call.function, constants);
      byName.get(call.function)?.parameters.forEach((parameter, i) => {
        const argument = call.arguments[i];
        const value = argument.kind === "value" && isLiteral(argument.value) ? argument.value : undefined;
        const usable = value !== undefined && value.type.kind !== "real" ? value : undefined;
        const before = constants.get(parameter.name);
        const agrees =
          !constants.has(parameter.name) || (before && usable && constantValue(before) === usable.value);
        constants.set(parameter.name, agrees ? usable : undefined);
      });
    });
  }
  const known = (constants: ReadonlyMap<string, Expression | undefined>) =>
    new Map([...constants].flatMap(([name, value]) => (value === undefined ? [] : [[name, value] as const])));
  return new Map([...seen].map(([name, constants]) => [name, known(constants)]));
};
