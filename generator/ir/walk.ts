import type { CallExpression, Expression } from "./expression.ts";
import type { FunctionDefinition } from "./program.ts";
import type { Statement } from "./statement.ts";

export const argumentValues = (call: CallExpression): readonly Expression[] =>
  call.arguments.flatMap((argument) => (argument.kind === "value" ? [argument.value] : []));

/** The expression and everything in it, outermost first. */
export const eachExpression = (expression: Expression, visit: (each: Expression) => void): void => {
  visit(expression);
  if (expression.kind === "call") {
    for (const argument of expression.arguments) {
      if (argument.kind === "value") {
        eachExpression(argument.value, visit);
      }
    }
  } else if (expression.kind === "operation") {
    for (const operand of expression.operands) {
      eachExpression(operand, visit);
    }
  } else if (expression.kind === "element") {
    eachExpression(expression.index, visit);
  }
};

/** A copy with `change` applied to every part, innermost first. */
export const mapExpression = (
  expression: Expression,
  change: (each: Expression) => Expression,
): Expression => {
  const inside = (each: Expression) => mapExpression(each, change);
  switch (expression.kind) {
    case "operation":
      return change({ ...expression, operands: expression.operands.map(inside) });
    case "element":
      return change({ ...expression, index: inside(expression.index) });
    case "call":
      return change({ ...mapCall(expression, inside), type: expression.type });
    default:
      return change(expression);
  }
};

export const mapCall = (call: CallExpression, change: (each: Expression) => Expression): CallExpression => ({
  ...call,
  arguments: call.arguments.map((argument) =>
    argument.kind === "value" ? { kind: "value", value: change(argument.value) } : argument,
  ),
});

/** Statement lists directly inside a statement. */
export const bodiesOf = (statement: Statement): readonly (readonly Statement[])[] => {
  switch (statement.kind) {
    case "if":
      return [statement.whenTrue, statement.whenFalse];
    case "switch":
      return [...statement.cases.map((each) => each.body), statement.otherwise];
    case "for":
    case "block":
      return [statement.body];
    default:
      return [];
  }
};

export const eachStatement = (body: readonly Statement[], visit: (each: Statement) => void): void => {
  for (const statement of body) {
    visit(statement);
    for (const inner of bodiesOf(statement)) {
      eachStatement(inner, visit);
    }
  }
};

/** Root expressions of one statement, without those of the statements inside it. */
export const expressionsOf = (statement: Statement): readonly Expression[] => {
  switch (statement.kind) {
    case "local":
      return [statement.value];
    case "assign":
      return statement.target.kind === "element"
        ? [statement.target.index, statement.value]
        : [statement.value];
    case "if":
      return [statement.condition];
    case "switch":
      return [statement.subject];
    case "for":
      return [statement.from, statement.below];
    case "call":
      return argumentValues(statement.call);
    case "block":
      return [];
  }
};

/** Every expression of a function, parts included. */
export const eachExpressionOf = (
  definition: Pick<FunctionDefinition, "body" | "result">,
  visit: (each: Expression) => void,
): void => {
  eachStatement(definition.body, (statement) => {
    for (const root of expressionsOf(statement)) {
      eachExpression(root, visit);
    }
  });
  if (definition.result !== undefined) {
    eachExpression(definition.result, visit);
  }
};

/** Every call of a function, those that stand alone included. */
export const eachCallOf = (
  definition: Pick<FunctionDefinition, "body" | "result">,
  visit: (call: CallExpression) => void,
): void => {
  eachStatement(definition.body, (statement) => {
    if (statement.kind === "call") {
      visit(statement.call);
    }
  });
  eachExpressionOf(definition, (expression) => {
    if (expression.kind === "call") {
      visit(expression);
    }
  });
};
