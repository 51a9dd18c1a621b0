import type { ts } from "ts-morph";
import {
  type Argument,
  type CallExpression,
  COUNT,
  type Expression,
  FLAG,
  REAL,
  type ValueType,
} from "../ir/expression.ts";
import { OPERATORS, type ValueKind } from "../ir/operators.ts";
import { compiler } from "./compiler.ts";
import { type DeclaredParameter, isValueType, type Signature, TABLE_PARTS } from "./declarations.ts";
import { intrinsicOperator, isIntrinsic } from "./intrinsics.ts";
import { findPlace, joinPart } from "./places.ts";
import { operation, readTyped } from "./read-expression.ts";
import { shortened } from "./read-types.ts";
import { Refused } from "./refusals.ts";
import { originOf, type Scope } from "./scope.ts";
import { spanOf } from "./source.ts";

const typeOfKind = (kind: ValueKind): ValueType => (kind === "real" ? REAL : kind === "count" ? COUNT : FLAG);
const LARGEST_BOUND = 2 ** 24;

const checkBounds = (node: ts.CallExpression, low: Expression, high: Expression): void => {
  const literal = low.kind === "count" && high.kind === "count";
  const inside =
    literal && low.value >= -LARGEST_BOUND && high.value <= LARGEST_BOUND && low.value <= high.value;
  if (!inside) {
    throw new Refused("literal-bounds", spanOf(node), `\`${shortened(node)}\` has no such bounds`);
  }
};

const readIntrinsic = (
  scope: Scope,
  node: ts.CallExpression,
  name: Parameters<typeof intrinsicOperator>[0],
): Expression => {
  const operator = intrinsicOperator(name);
  const { takes, gives } = OPERATORS[operator];
  checkCount(node, name, takes.length);
  const operands = takes.map((kind, i) => readTyped(scope, node.arguments[i], typeOfKind(kind)));
  if (operator === "toCount") {
    checkBounds(node, operands[1], operands[2]);
  }
  return operation(operator, operands, node, typeOfKind(gives));
};

const checkCount = (node: ts.CallExpression, name: string, expected: number): void => {
  if (node.arguments.length !== expected) {
    throw new Refused(
      "wrong-arguments",
      spanOf(node),
      `\`${name}\` takes ${expected} arguments, got ${node.arguments.length}`,
    );
  }
};

const wrong = (node: ts.Node, parameter: DeclaredParameter): never => {
  throw new Refused(
    "wrong-arguments",
    spanOf(node),
    `\`${shortened(node)}\` does not fit the parameter \`${parameter.name}\``,
  );
};

const readArgument = (
  scope: Scope,
  node: ts.Expression,
  parameter: DeclaredParameter,
): readonly Argument[] => {
  const { type } = parameter;
  if (isValueType(type)) {
    return [{ kind: "value", value: readTyped(scope, node, type) }];
  }
  if (type.kind === "structure") {
    const passedOn = compiler().isIdentifier(node) && scope.parameters.get(node.text)?.kind === "structure";
    if (!passedOn) {
      throw new Refused("structure-argument", spanOf(node), `\`${shortened(node)}\` is not the structure`);
    }
    return [];
  }
  const found = findPlace(scope, node);
  if (found === undefined || found.type.kind !== type.kind) {
    return wrong(node, parameter);
  }
  if (type.kind === "struct") {
    const fits = found.type.kind === "struct" && found.type.name === type.name;
    return fits ? [{ kind: "struct", place: found.place, struct: type.name }] : wrong(node, parameter);
  }
  if (type.kind === "table") {
    const fits = found.type.kind === "table" && found.type.name === type.name;
    return fits
      ? TABLE_PARTS[type.name].map((part) => ({ kind: "array", place: joinPart(found.place, part) }))
      : wrong(node, parameter);
  }
  return [{ kind: "array", place: found.place }];
};

const calledFunction = (scope: Scope, node: ts.CallExpression): Signature => {
  const callee = node.expression;
  const signature = compiler().isIdentifier(callee)
    ? scope.declarations.functions.get(callee.text)
    : undefined;
  if (signature === undefined) {
    throw new Refused(
      "unknown-name",
      spanOf(callee),
      `\`${shortened(callee)}\` is no function of the runtime`,
    );
  }
  return signature;
};

/** A call of an intrinsic, which is an operation, or of another function of the runtime. */
export const readCall = (scope: Scope, node: ts.CallExpression): Expression | CallExpression => {
  const callee = node.expression;
  if (compiler().isIdentifier(callee) && isIntrinsic(callee.text)) {
    return readIntrinsic(scope, node, callee.text);
  }
  const signature = calledFunction(scope, node);
  checkCount(node, signature.name, signature.parameters.length);
  return {
    kind: "call",
    function: signature.name,
    arguments: signature.parameters.flatMap((parameter, i) =>
      readArgument(scope, node.arguments[i], parameter),
    ),
    type: signature.returns,
    origin: originOf(node),
  };
};
