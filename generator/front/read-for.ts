import type { ts } from "ts-morph";
import { COUNT, type Expression } from "../ir/expression.ts";
import type { Statement } from "../ir/statement.ts";
import { eachExpression } from "../ir/walk.ts";
import { compiler } from "./compiler.ts";
import { readTyped } from "./read-expression.ts";
import { readBody } from "./read-statement.ts";
import { shortened } from "./read-types.ts";
import { Refused } from "./refusals.ts";
import { declareLocal, inner, originOf, type Scope } from "./scope.ts";
import { commentsAbove, spanOf } from "./source.ts";

interface Parts {
  readonly variable: ts.Identifier;
  readonly from: ts.Expression;
  readonly below: ts.Expression;
}

/** `let i = A; i < B; i++` and nothing else. */
const partsOf = (node: ts.ForStatement): Parts | undefined => {
  const {
    isVariableDeclarationList,
    isIdentifier,
    isBinaryExpression,
    isPostfixUnaryExpression,
    SyntaxKind,
  } = compiler();
  const { initializer, condition, incrementor } = node;
  const first =
    initializer && isVariableDeclarationList(initializer) ? initializer.declarations[0] : undefined;
  const counted =
    condition && isBinaryExpression(condition) && condition.operatorToken.kind === SyntaxKind.LessThanToken;
  const byOne =
    incrementor && isPostfixUnaryExpression(incrementor) && incrementor.operator === SyntaxKind.PlusPlusToken;
  if (!first?.initializer || !isIdentifier(first.name) || !counted || !byOne) {
    return undefined;
  }
  const names = [condition.left, incrementor.operand].map((each) => each.getText());
  return names.every((name) => name === first.name.getText())
    ? { variable: first.name, from: first.initializer, below: condition.right }
    : undefined;
};

const isFixed = (bound: Expression): boolean => {
  let fixed = true;
  eachExpression(bound, ({ kind }) => {
    fixed &&=
      kind === "count" ||
      kind === "constant" ||
      kind === "structure" ||
      kind === "length" ||
      kind === "operation";
  });
  return fixed;
};

export const readFor = (scope: Scope, node: ts.ForStatement): Statement => {
  const parts = partsOf(node);
  if (parts === undefined) {
    throw new Refused(
      "unsupported-loop",
      spanOf(node),
      `\`${shortened(node)}\` does not count from one fixed number to another`,
    );
  }
  const from = readTyped(scope, parts.from, COUNT);
  const below = readTyped(scope, parts.below, COUNT);
  for (const [bound, written] of [
    [from, parts.from],
    [below, parts.below],
  ] as const) {
    if (!isFixed(bound)) {
      throw new Refused(
        "unsupported-loop",
        spanOf(written),
        `the bound \`${shortened(written)}\` is not known before the step runs`,
      );
    }
  }
  const body = inner(scope);
  declareLocal(body, parts.variable.text, { type: COUNT, mutable: false }, parts.variable);
  return {
    kind: "for",
    variable: parts.variable.text,
    from,
    below,
    body: readBody(body, node.statement),
    comments: commentsAbove(node),
    origin: originOf(node),
  };
};
