import type { Argument, Expression } from "../ir/expression.ts";
import type { FunctionDefinition } from "../ir/program.ts";
import { mapFunction } from "./map-function.ts";

/** A function left with nothing but the return of one of its parameters or a constant: not worth a call. */
const isTrivial = ({ body, result }: FunctionDefinition): boolean =>
  body.length === 0 && (result?.kind === "local" || result?.kind === "real" || result?.kind === "constant");

const inlined = (definition: FunctionDefinition, given: readonly Argument[]): Expression | undefined => {
  const { result } = definition;
  if (result?.kind !== "local") {
    return result;
  }
  const argument = given[definition.parameters.findIndex(({ name }) => name === result.name)];
  return argument?.kind === "value" ? argument.value : undefined;
};

/** Replaces calls of trivial functions by what they return; arguments are pure, so dropping the others is safe. */
export const inlineTrivial = (functions: readonly FunctionDefinition[]): readonly FunctionDefinition[] => {
  const trivial = new Map(functions.filter(isTrivial).map((each) => [each.name, each]));
  if (trivial.size === 0) {
    return functions;
  }
  return functions.map((each) =>
    mapFunction(each, (expression) => {
      const callee = expression.kind === "call" ? trivial.get(expression.function) : undefined;
      return expression.kind === "call" && callee !== undefined
        ? (inlined(callee, expression.arguments) ?? expression)
        : expression;
    }),
  );
};
