import type { ts } from "ts-morph";
import { COUNT, type Expression, FLAG, REAL, sameType, type ValueType } from "../ir/expression.ts";
import { OPERATORS, type OperatorName } from "../ir/operators.ts";
import { compiler } from "./compiler.ts";
import { isValueType } from "./declarations.ts";
import { findArray, findPlace } from "./places.ts";
import { readCall } from "./read-call.ts";
import { shortened } from "./read-types.ts";
import { type RefusalCode, Refused } from "./refusals.ts";
import { findLocal, originOf, type Scope } from "./scope.ts";
import { spanOf } from "./source.ts";

const refuse = (code: RefusalCode, node: ts.Node, message: string): never => {
  throw new Refused(code, spanOf(node), message);
};

const described = (type: ValueType): string =>
  type.kind === "enum" ? `\`${type.name}\`` : { real: "a Real", count: "a Count", flag: "a Flag" }[type.kind];

/** An expression of a known type; a literal takes that type. */
export const readTyped = (scope: Scope, node: ts.Expression, type: ValueType): Expression => {
  const expression = readExpression(scope, node, type);
  if (!sameType(expression.type, type)) {
    const mixed = [expression.type.kind, type.kind].sort().join() === "count,real";
    refuse(
      mixed ? "mixed-types" : "wrong-type",
      node,
      `\`${shortened(node)}\` is ${described(expression.type)}, expected ${described(type)}`,
    );
  }
  return expression;
};

/** Made of literals only, so that its type is that of its surroundings. */
const isBare = (node: ts.Expression): boolean => {
  const { isNumericLiteral, isStringLiteral, isParenthesizedExpression, isPrefixUnaryExpression } =
    compiler();
  const { isBinaryExpression, isConditionalExpression, SyntaxKind } = compiler();
  if (isParenthesizedExpression(node)) {
    return isBare(node.expression);
  }
  if (isPrefixUnaryExpression(node)) {
    return node.operator === SyntaxKind.MinusToken && isBare(node.operand);
  }
  if (isBinaryExpression(node)) {
    return ARITHMETIC.has(node.operatorToken.kind) && isBare(node.left) && isBare(node.right);
  }
  if (isConditionalExpression(node)) {
    return isBare(node.whenTrue) && isBare(node.whenFalse);
  }
  return isNumericLiteral(node) || isStringLiteral(node);
};

/** Two operands of one type: the one that knows its type decides. */
const readPair = (
  scope: Scope,
  left: ts.Expression,
  right: ts.Expression,
  expected: ValueType | undefined,
): readonly [Expression, Expression] => {
  if (isBare(left) && !isBare(right)) {
    const known = readExpression(scope, right, expected);
    return [readTyped(scope, left, known.type), known];
  }
  const known = readExpression(scope, left, expected);
  return [known, readTyped(scope, right, known.type)];
};

/** Operator names by token, for operands of each kind. */
const TOKENS = (): ReadonlyMap<ts.SyntaxKind, Partial<Record<ValueType["kind"], OperatorName>>> => {
  const { SyntaxKind: kind } = compiler();
  return new Map<ts.SyntaxKind, Partial<Record<ValueType["kind"], OperatorName>>>([
    [kind.PlusToken, { real: "add", count: "addCount" }],
    [kind.MinusToken, { real: "subtract", count: "subtractCount" }],
    [kind.AsteriskToken, { real: "multiply", count: "multiplyCount" }],
    [kind.SlashToken, { real: "divide" }],
    [kind.LessThanToken, { real: "less", count: "lessCount" }],
    [kind.LessThanEqualsToken, { real: "lessEqual", count: "lessEqualCount" }],
    [kind.GreaterThanToken, { real: "greater", count: "greaterCount" }],
    [kind.GreaterThanEqualsToken, { real: "greaterEqual", count: "greaterEqualCount" }],
    [kind.EqualsEqualsEqualsToken, { count: "equalCount", flag: "equalFlag", enum: "equalEnum" }],
    [
      kind.ExclamationEqualsEqualsToken,
      { count: "notEqualCount", flag: "notEqualFlag", enum: "notEqualEnum" },
    ],
    [kind.AmpersandAmpersandToken, { flag: "and" }],
    [kind.BarBarToken, { flag: "or" }],
  ]);
};
let tokens: ReturnType<typeof TOKENS> | undefined;
const ARITHMETIC = {
  has: (kind: ts.SyntaxKind): boolean => {
    const { SyntaxKind } = compiler();
    return [
      SyntaxKind.PlusToken,
      SyntaxKind.MinusToken,
      SyntaxKind.AsteriskToken,
      SyntaxKind.SlashToken,
    ].some((each) => each === kind);
  },
};

export const operation = (
  operator: OperatorName,
  operands: readonly Expression[],
  node: ts.Node,
  type: ValueType,
): Expression => ({ kind: "operation", operator, operands, type, origin: originOf(node) });

const resultType = (operator: OperatorName, operand: ValueType): ValueType => {
  const { gives } = OPERATORS[operator];
  return gives === "flag" ? FLAG : gives === "count" ? COUNT : gives === "real" ? REAL : operand;
};

const readBinary = (scope: Scope, node: ts.BinaryExpression, expected: ValueType | undefined): Expression => {
  const token = node.operatorToken.kind;
  tokens ??= TOKENS();
  const choices = tokens.get(token);
  if (choices === undefined) {
    return refuse(
      "unsupported-operator",
      node.operatorToken,
      `\`${node.operatorToken.getText()}\` cannot be compiled`,
    );
  }
  const [left, right] = readPair(scope, node.left, node.right, ARITHMETIC.has(token) ? expected : undefined);
  const operator = choices[left.type.kind];
  if (operator === undefined) {
    return refuseOperator(node, left.type);
  }
  return operation(operator, [left, right], node, resultType(operator, left.type));
};

const refuseOperator = (node: ts.BinaryExpression, type: ValueType): never => {
  const text = node.operatorToken.getText();
  if (type.kind === "real" && (text === "===" || text === "!==")) {
    return refuse("real-equality", node, `\`${shortened(node)}\` compares reals with \`${text}\``);
  }
  if (type.kind === "count" && text === "/") {
    return refuse("division-of-counts", node, `\`${shortened(node)}\` divides counts`);
  }
  return refuse("wrong-type", node, `\`${text}\` does not take ${described(type)}`);
};

const readUnary = (
  scope: Scope,
  node: ts.PrefixUnaryExpression,
  expected: ValueType | undefined,
): Expression => {
  const { SyntaxKind } = compiler();
  if (node.operator === SyntaxKind.ExclamationToken) {
    return operation("not", [readTyped(scope, node.operand, FLAG)], node, FLAG);
  }
  if (node.operator !== SyntaxKind.MinusToken) {
    return refuse("unsupported-operator", node, `\`${shortened(node)}\` cannot be compiled`);
  }
  const operand = readExpression(scope, node.operand, expected);
  if (operand.kind === "real" || operand.kind === "count") {
    return { ...operand, value: -operand.value, origin: originOf(node) };
  }
  if (operand.type.kind !== "real" && operand.type.kind !== "count") {
    return refuse("wrong-type", node, `\`-\` does not take ${described(operand.type)}`);
  }
  return operation(operand.type.kind === "real" ? "negate" : "negateCount", [operand], node, operand.type);
};

const SELECT = { real: "selectReal", count: "selectCount", flag: "selectFlag", enum: "selectEnum" } as const;

const readConditional = (
  scope: Scope,
  node: ts.ConditionalExpression,
  expected: ValueType | undefined,
): Expression => {
  const condition = readTyped(scope, node.condition, FLAG);
  const [whenTrue, whenFalse] = readPair(scope, node.whenTrue, node.whenFalse, expected);
  return operation(SELECT[whenTrue.type.kind], [condition, whenTrue, whenFalse], node, whenTrue.type);
};

const readNumber = (node: ts.NumericLiteral, expected: ValueType | undefined): Expression => {
  const value = Number(node.text);
  if (expected?.kind === "count") {
    if (!Number.isInteger(value) || value > 2147483647) {
      return refuse("whole-number", node, `\`${node.getText()}\` is no Count`);
    }
    return { kind: "count", value, type: COUNT, origin: originOf(node) };
  }
  if (expected === undefined) {
    return refuse("untyped-literal", node, `nothing says whether \`${node.getText()}\` is a Real or a Count`);
  }
  return { kind: "real", value, type: REAL, origin: originOf(node) };
};

const readMember = (scope: Scope, node: ts.StringLiteral, expected: ValueType | undefined): Expression => {
  const enumeration =
    expected?.kind === "enum" ? scope.declarations.enumerations.get(expected.name) : undefined;
  if (expected === undefined || enumeration === undefined) {
    return refuse("wrong-type", node, `nothing says which enumeration \`${node.getText()}\` belongs to`);
  }
  if (!enumeration.members.includes(node.text)) {
    return refuse("unknown-name", node, `\`${node.text}\` is not one of ${enumeration.members.join(", ")}`);
  }
  return { kind: "member", value: node.text, type: expected, origin: originOf(node) };
};

const readIdentifier = (scope: Scope, node: ts.Identifier): Expression => {
  const origin = originOf(node);
  const local = findLocal(scope, node.text);
  if (local !== undefined) {
    return { kind: "local", name: node.text, type: local.type, origin };
  }
  const parameter = scope.parameters.get(node.text);
  if (parameter !== undefined) {
    return isValueType(parameter)
      ? { kind: "local", name: node.text, type: parameter, origin }
      : refuse("struct-as-value", node, `\`${node.text}\` is no single value`);
  }
  const constant = scope.declarations.constants.get(node.text);
  if (constant === undefined) {
    return refuse("unknown-name", node, `\`${node.text}\` is not declared`);
  }
  return { kind: "constant", name: constant.name, value: constant.value, type: constant.type, origin };
};

const isStructureField = (scope: Scope, node: ts.PropertyAccessExpression): boolean =>
  compiler().isIdentifier(node.expression) &&
  scope.parameters.get(node.expression.text)?.kind === "structure";

const readProperty = (scope: Scope, node: ts.PropertyAccessExpression): Expression => {
  const origin = originOf(node);
  if (isStructureField(scope, node)) {
    const type = scope.declarations.structure.get(node.name.text);
    return type === undefined
      ? refuse("unknown-name", node.name, `the structure has no \`${node.name.text}\``)
      : { kind: "structure", field: node.name.text, type, origin };
  }
  const array = node.name.text === "length" ? findArray(scope, node.expression) : undefined;
  if (array !== undefined) {
    return { kind: "length", place: array.place, type: COUNT, origin };
  }
  const found = findPlace(scope, node);
  if (found === undefined) {
    return refuse("unsupported-expression", node, `\`${shortened(node)}\` is no field of a parameter`);
  }
  return isValueType(found.type)
    ? { kind: "field", place: found.place, type: found.type, origin }
    : refuse("struct-as-value", node, `\`${shortened(node)}\` is no single value`);
};

const readElement = (scope: Scope, node: ts.ElementAccessExpression): Expression => {
  const array = findArray(scope, node.expression);
  if (array === undefined) {
    return refuse(
      "unsupported-expression",
      node,
      `\`${shortened(node.expression)}\` is no array of a parameter`,
    );
  }
  const index = readTyped(scope, node.argumentExpression, COUNT);
  return { kind: "element", place: array.place, index, type: REAL, origin: originOf(node) };
};

/** One expression of the restricted language; `expected` is the type that a bare literal takes. */
export const readExpression = (scope: Scope, node: ts.Expression, expected?: ValueType): Expression => {
  const is = compiler();
  if (is.isParenthesizedExpression(node)) return readExpression(scope, node.expression, expected);
  if (is.isNumericLiteral(node)) return readNumber(node, expected);
  if (is.isStringLiteral(node)) return readMember(scope, node, expected);
  if (is.isIdentifier(node)) return readIdentifier(scope, node);
  if (is.isPropertyAccessExpression(node)) return readProperty(scope, node);
  if (is.isElementAccessExpression(node)) return readElement(scope, node);
  if (is.isBinaryExpression(node)) return readBinary(scope, node, expected);
  if (is.isPrefixUnaryExpression(node)) return readUnary(scope, node, expected);
  if (is.isConditionalExpression(node)) return readConditional(scope, node, expected);
  if (is.isCallExpression(node)) {
    const call = readCall(scope, node);
    return call.kind === "call" && call.type === undefined
      ? refuse("wrong-type", node, `\`${call.function}\` returns nothing`)
      : (call as Expression);
  }
  if (node.kind === is.SyntaxKind.TrueKeyword || node.kind === is.SyntaxKind.FalseKeyword) {
    return {
      kind: "flag",
      value: node.kind === is.SyntaxKind.TrueKeyword,
      type: FLAG,
      origin: originOf(node),
    };
  }
  return refuse("unsupported-expression", node, `\`${shortened(node)}\` cannot be compiled`);
};
