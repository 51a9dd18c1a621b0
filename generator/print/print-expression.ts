import type { CallExpression, Expression } from "../ir/expression.ts";
import type { FunctionDefinition } from "../ir/program.ts";
import { atom, type Dialect, type Printed } from "./dialect.ts";

/** Where an expression stands: the function around it, and every function it can call. */
export interface Surroundings {
  readonly dialect: Dialect;
  readonly owner: FunctionDefinition;
  readonly functions: ReadonlyMap<string, FunctionDefinition>;
}

const printCount = (value: number): Printed => ({ text: String(value), atomic: value >= 0 });

export const printCall = (around: Surroundings, call: CallExpression): string => {
  const { dialect, owner, functions } = around;
  const parameters = functions.get(call.function)?.parameters ?? [];
  const printed = call.arguments.flatMap((argument, i) =>
    argument.kind === "value"
      ? [printExpression(around, argument.value).text]
      : dialect.argument(owner, argument, parameters[i].type),
  );
  return `${dialect.function(call.function)}(${printed.join(", ")})`;
};

export const printExpression = (around: Surroundings, expression: Expression): Printed => {
  const { dialect, owner } = around;
  switch (expression.kind) {
    case "real":
      return dialect.real(expression.value);
    case "count":
      return printCount(expression.value);
    case "flag":
      return atom(String(expression.value));
    case "member":
      return atom(dialect.member(expression.type, expression.value));
    case "constant":
      return atom(dialect.constant(expression.name));
    case "local":
      return atom(dialect.local(expression.name));
    case "field":
      return atom(dialect.place(owner, expression.place));
    case "element":
      return atom(
        `${dialect.place(owner, expression.place)}[${printExpression(around, expression.index).text}]`,
      );
    case "length":
      return atom(dialect.length(expression.place));
    case "operation":
      return dialect.spell[expression.operator](
        expression.operands.map((each) => printExpression(around, each)),
      );
    case "call":
      return atom(printCall(around, expression));
    case "structure":
      throw new Error(`internal: the structure's ${expression.field} was not fixed`);
  }
};
