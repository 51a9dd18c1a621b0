import type { CallExpression, Expression } from "../ir/expression.ts";
import type { FunctionDefinition } from "../ir/program.ts";
import type { Statement } from "../ir/statement.ts";
import { mapCall, mapExpression } from "../ir/walk.ts";

export type Change = (expression: Expression) => Expression;
/** For calls wherever they stand: alone, as statements, or in expressions. */
export type ChangeCall = (call: CallExpression) => CallExpression;

const mapStatement = (statement: Statement, change: Change, changeCall: ChangeCall): Statement => {
  const all = (expression: Expression) => mapExpression(expression, change);
  const bodies = (body: readonly Statement[]) => body.map((each) => mapStatement(each, change, changeCall));
  switch (statement.kind) {
    case "local":
      return { ...statement, value: all(statement.value) };
    case "assign": {
      const { target } = statement;
      const index = target.kind === "element" ? { ...target, index: all(target.index) } : target;
      return { ...statement, target: index, value: all(statement.value) };
    }
    case "if":
      return {
        ...statement,
        condition: all(statement.condition),
        whenTrue: bodies(statement.whenTrue),
        whenFalse: bodies(statement.whenFalse),
      };
    case "switch":
      return {
        ...statement,
        subject: all(statement.subject),
        cases: statement.cases.map((each) => ({ ...each, body: bodies(each.body) })),
        otherwise: bodies(statement.otherwise),
      };
    case "for":
      return {
        ...statement,
        from: all(statement.from),
        below: all(statement.below),
        body: bodies(statement.body),
      };
    case "call":
      return { ...statement, call: changeCall(mapCall(statement.call, all)) };
    case "block":
      return { ...statement, body: bodies(statement.body) };
  }
};

/** A copy with `change` applied to every expression, innermost first, and `changeCall` to every call. */
export const mapFunction = (
  definition: FunctionDefinition,
  change: Change,
  changeCall: ChangeCall = (call) => call,
): FunctionDefinition => {
  const both: Change = (each) =>
    change(each.kind === "call" ? { ...changeCall(each), type: each.type } : each);
  return {
    ...definition,
    body: definition.body.map((each) => mapStatement(each, both, changeCall)),
    ...(definition.result === undefined ? {} : { result: mapExpression(definition.result, both) }),
  };
};
