import type { ts } from "ts-morph";
import { COUNT, type Expression, FLAG, REAL } from "../ir/expression.ts";
import type { Statement, Target } from "../ir/statement.ts";
import { compiler } from "./compiler.ts";
import { isValueType } from "./declarations.ts";
import { findArray, findPlace } from "./places.ts";
import { readCall } from "./read-call.ts";
import { readExpression, readTyped } from "./read-expression.ts";
import { readFor } from "./read-for.ts";
import { readSwitch } from "./read-switch.ts";
import { readType, shortened, type TypeNames } from "./read-types.ts";
import { Refused } from "./refusals.ts";
import { declareLocal, findLocal, inner, originOf, type Scope } from "./scope.ts";
import { commentsAbove, spanOf } from "./source.ts";

const namesIn = (scope: Scope): TypeNames => ({
  enumerations: new Set(scope.declarations.enumerations.keys()),
  interfaces: new Set(scope.declarations.interfaces.keys()),
});

const readLocal = (scope: Scope, node: ts.VariableStatement): readonly Statement[] => {
  const { NodeFlags } = compiler();
  const { flags, declarations } = node.declarationList;
  if ((flags & (NodeFlags.Const | NodeFlags.Let)) === 0) {
    throw new Refused(
      "unsupported-statement",
      spanOf(node),
      "`var` cannot be compiled; write `const` or `let`",
    );
  }
  return declarations.map((each, i) => {
    const name = each.name.getText();
    if (!compiler().isIdentifier(each.name) || each.initializer === undefined) {
      throw new Refused("unsupported-statement", spanOf(each), "a local is one name with a first value");
    }
    const type = each.type === undefined ? undefined : readType(each.type, namesIn(scope));
    if (type !== undefined && !isValueType(type)) {
      throw new Refused("struct-as-value", spanOf(each), `\`${name}\` cannot hold a struct`);
    }
    const value =
      type === undefined ? readExpression(scope, each.initializer) : readTyped(scope, each.initializer, type);
    const mutable = (flags & NodeFlags.Let) !== 0;
    declareLocal(scope, name, { type: value.type, mutable }, each.name);
    const comments = i === 0 ? commentsAbove(node) : [];
    return { kind: "local", name, type: value.type, mutable, value, comments, origin: originOf(each) };
  });
};

const localTarget = (scope: Scope, node: ts.Identifier): { target: Target; type: Expression["type"] } => {
  const local = findLocal(scope, node.text);
  if (local === undefined) {
    const code = scope.parameters.has(node.text) ? "assigned-parameter" : "unknown-name";
    throw new Refused(code, spanOf(node), `\`${node.text}\` is no local that can be assigned`);
  }
  if (!local.mutable) {
    throw new Refused("assigned-constant", spanOf(node), `\`${node.text}\` is declared with \`const\``);
  }
  return { target: { kind: "local", name: node.text }, type: local.type };
};

const readTarget = (scope: Scope, node: ts.Expression): { target: Target; type: Expression["type"] } => {
  const { isIdentifier, isElementAccessExpression } = compiler();
  if (isIdentifier(node)) {
    return localTarget(scope, node);
  }
  const array = isElementAccessExpression(node) ? findArray(scope, node.expression) : undefined;
  if (isElementAccessExpression(node) && array !== undefined) {
    if (array.field === undefined || array.field.readonly || array.field.type.kind === "table") {
      throw new Refused(
        "read-only-field",
        spanOf(node),
        `\`${shortened(node.expression)}\` cannot be written`,
      );
    }
    const index = readTyped(scope, node.argumentExpression, COUNT);
    return { target: { kind: "element", place: array.place, index }, type: REAL };
  }
  const found = findPlace(scope, node);
  if (found === undefined || !isValueType(found.type)) {
    throw new Refused("unsupported-statement", spanOf(node), `\`${shortened(node)}\` cannot be assigned`);
  }
  if (found.field?.readonly) {
    throw new Refused("read-only-field", spanOf(node), `\`${shortened(node)}\` is declared \`readonly\``);
  }
  return { target: { kind: "field", place: found.place }, type: found.type };
};

const readAssignment = (
  scope: Scope,
  node: ts.ExpressionStatement,
  assignment: ts.BinaryExpression,
): Statement => {
  const { target, type } = readTarget(scope, assignment.left);
  const value = readTyped(scope, assignment.right, type);
  return { kind: "assign", target, value, comments: commentsAbove(node), origin: originOf(node) };
};

const readExpressionStatement = (scope: Scope, node: ts.ExpressionStatement): Statement => {
  const { isBinaryExpression, isCallExpression, SyntaxKind } = compiler();
  const inside = node.expression;
  if (isBinaryExpression(inside)) {
    const token = inside.operatorToken.kind;
    if (token === SyntaxKind.EqualsToken) {
      return readAssignment(scope, node, inside);
    }
    if (token >= SyntaxKind.FirstAssignment && token <= SyntaxKind.LastAssignment) {
      throw new Refused("compound-assignment", spanOf(node), `\`${shortened(node)}\` hides an operation`);
    }
  }
  const call = isCallExpression(inside) ? readCall(scope, inside) : undefined;
  if (call === undefined || call.kind !== "call") {
    throw new Refused(
      "unsupported-statement",
      spanOf(node),
      `\`${shortened(node)}\` has no effect that can be compiled`,
    );
  }
  return { kind: "call", call, comments: commentsAbove(node), origin: originOf(node) };
};

const readIf = (scope: Scope, node: ts.IfStatement): Statement => ({
  kind: "if",
  condition: readTyped(scope, node.expression, FLAG),
  whenTrue: readBody(scope, node.thenStatement),
  whenFalse: node.elseStatement === undefined ? [] : readBody(scope, node.elseStatement),
  comments: commentsAbove(node),
  origin: originOf(node),
});

/** A block, or a single statement in place of one, with names of its own. */
export const readBody = (scope: Scope, node: ts.Statement): readonly Statement[] =>
  readStatements(inner(scope), compiler().isBlock(node) ? [...node.statements] : [node]);

export const readStatements = (scope: Scope, nodes: readonly ts.Statement[]): readonly Statement[] =>
  nodes.flatMap((node) => {
    try {
      return readStatement(scope, node);
    } catch (error) {
      if (!(error instanceof Refused)) {
        throw error;
      }
      scope.refusals.push(error.refusal);
      return [];
    }
  });

const readStatement = (scope: Scope, node: ts.Statement): readonly Statement[] => {
  const is = compiler();
  if (is.isVariableStatement(node)) return readLocal(scope, node);
  if (is.isExpressionStatement(node)) return [readExpressionStatement(scope, node)];
  if (is.isIfStatement(node)) return [readIf(scope, node)];
  if (is.isForStatement(node)) return [readFor(scope, node)];
  if (is.isSwitchStatement(node)) return [readSwitch(scope, node)];
  if (is.isReturnStatement(node)) {
    throw new Refused("early-return", spanOf(node), "a function returns at its end only");
  }
  if (
    is.isWhileStatement(node) ||
    is.isDoStatement(node) ||
    is.isForOfStatement(node) ||
    is.isForInStatement(node)
  ) {
    throw new Refused("unsupported-loop", spanOf(node), `\`${shortened(node)}\` cannot be compiled`);
  }
  throw new Refused("unsupported-statement", spanOf(node), `\`${shortened(node)}\` cannot be compiled`);
};
