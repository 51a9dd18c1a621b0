import type { FunctionDefinition } from "../ir/program.ts";
import { eachCallOf, eachExpressionOf } from "../ir/walk.ts";

/** Marks the array parameters whose length is needed, there or further down; `functions` in call order, callees first. */
export const countArrays = (functions: readonly FunctionDefinition[]): readonly FunctionDefinition[] => {
  const done = new Map<string, FunctionDefinition>();
  for (const definition of functions) {
    const counted = new Set<string>();
    eachExpressionOf(definition, (each) => {
      if (each.kind === "length") {
        counted.add(each.place.root);
      }
    });
    eachCallOf(definition, (call) => {
      done.get(call.function)?.parameters.forEach(({ type }, i) => {
        const argument = call.arguments[i];
        if (
          type.kind === "array" &&
          type.counted &&
          argument.kind === "array" &&
          argument.size === undefined
        ) {
          counted.add(argument.place.root);
        }
      });
    });
    done.set(definition.name, {
      ...definition,
      parameters: definition.parameters.map((parameter) =>
        parameter.type.kind === "array"
          ? { ...parameter, type: { kind: "array", counted: counted.has(parameter.name) } }
          : parameter,
      ),
    });
  }
  return [...done.values()];
};
