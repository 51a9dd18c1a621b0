import { evaluate, operations, type Value } from "../interpret/operations.ts";
import { type Expression, isLiteral, type Literal, type Origin, type ValueType } from "../ir/expression.ts";
import { mapExpression } from "../ir/walk.ts";
import type { Precision } from "../lowered.ts";

/** What is known when code is generated: the structure, rounded module constants, and locals that never change. */
export interface Known {
  readonly precision: Precision;
  readonly structure: Readonly<Record<string, Value>>;
  readonly locals: ReadonlyMap<string, Expression>;
}

export const literal = (value: Value, type: ValueType, origin: Origin): Literal => {
  switch (type.kind) {
    case "real":
      return { kind: "real", value: value as number, type, origin };
    case "count":
      return { kind: "count", value: value as number, type, origin };
    case "flag":
      return { kind: "flag", value: value as boolean, type, origin };
    case "enum":
      return { kind: "member", value: value as string, type, origin };
  }
};

/** Value of an expression that is a constant already. */
export const constantValue = (expression: Expression): Value | undefined =>
  isLiteral(expression) || expression.kind === "constant" ? expression.value : undefined;

/** Both sides of `and`, `or` and selection are pure, so a constant side decides without touching any real number. */
const decided = (expression: Expression): Expression => {
  if (expression.kind !== "operation") {
    return expression;
  }
  const [first, second, third] = expression.operands;
  const known = constantValue(first);
  switch (expression.operator) {
    case "and":
    case "or": {
      const neutral = expression.operator === "and";
      if (known !== undefined) {
        return known === neutral ? second : first;
      }
      const other = constantValue(second);
      return other === undefined ? expression : other === neutral ? first : second;
    }
    case "selectReal":
    case "selectCount":
    case "selectFlag":
    case "selectEnum":
      return known === undefined ? expression : known ? second : third;
    default:
      return expression;
  }
};

const replaced = (known: Known, expression: Expression): Expression => {
  if (expression.kind === "structure") {
    const value = known.structure[expression.field];
    const { type, origin, field } = expression;
    return type.kind === "real" || type.kind === "count"
      ? { kind: "constant", name: field, value: value as number, type, origin }
      : literal(value, type, origin);
  }
  return expression.kind === "local" ? (known.locals.get(expression.name) ?? expression) : expression;
};

/**
 * Folds operations whose operands are all constants, in the target's precision. No identity on reals is used: x + 0 and
 * x * 1 change -0 and NaN.
 */
export const fold = (known: Known, expression: Expression): Expression => {
  const table = operations(known.precision);
  return mapExpression(expression, (each) => {
    const plain = replaced(known, each);
    if (plain.kind !== "operation") {
      return plain;
    }
    const values = plain.operands.map(constantValue);
    return values.every((value) => value !== undefined)
      ? literal(evaluate(table[plain.operator], values as Value[]), plain.type, plain.origin)
      : decided(plain);
  });
};
