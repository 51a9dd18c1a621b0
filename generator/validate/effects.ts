import type { CallExpression, Expression } from "../ir/expression.ts";
import type { FunctionDefinition } from "../ir/program.ts";
import { eachCallOf, eachExpression, eachStatement } from "../ir/walk.ts";

/** Parameters a function writes into, itself or through what it calls; by function name. */
export type Effects = ReadonlyMap<string, ReadonlySet<string>>;

/** `functions` in call order, callees first. */
export const effectsOf = (functions: readonly FunctionDefinition[]): Effects => {
  const effects = new Map<string, ReadonlySet<string>>();
  const byName = new Map(functions.map((each) => [each.name, each]));
  for (const definition of functions) {
    const written = new Set<string>();
    eachStatement(definition.body, (statement) => {
      if (statement.kind === "assign" && statement.target.kind !== "local") {
        written.add(statement.target.place.root);
      }
    });
    eachCallOf(definition, (call) => {
      for (const root of writtenArguments(call, byName.get(call.function), effects)) {
        written.add(root);
      }
    });
    effects.set(definition.name, written);
  }
  return effects;
};

const writtenArguments = (
  call: CallExpression,
  callee: FunctionDefinition | undefined,
  effects: Effects,
): readonly string[] =>
  (callee?.parameters ?? []).flatMap((parameter, i) => {
    const argument = call.arguments[i];
    const isWritten = effects.get(call.function)?.has(parameter.name) ?? false;
    return isWritten && argument.kind === "struct" ? [argument.place.root] : [];
  });

export const isPureCall = (call: CallExpression, effects: Effects): boolean =>
  (effects.get(call.function)?.size ?? 0) === 0;

export const isPure = (expression: Expression, effects: Effects): boolean => {
  let pure = true;
  eachExpression(expression, (each) => {
    pure &&= each.kind !== "call" || isPureCall(each, effects);
  });
  return pure;
};
