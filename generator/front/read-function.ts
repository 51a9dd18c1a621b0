import type { ts } from "ts-morph";
import type { Expression } from "../ir/expression.ts";
import type { FunctionDefinition, Parameter } from "../ir/program.ts";
import { compiler } from "./compiler.ts";
import {
  type Declarations,
  type DeclaredParameter,
  isValueType,
  type Signature,
  TABLE_PARTS,
} from "./declarations.ts";
import { readTyped } from "./read-expression.ts";
import { readStatements } from "./read-statement.ts";
import { type Refusal, Refused } from "./refusals.ts";
import type { Scope } from "./scope.ts";
import { commentsAbove, spanOf } from "./source.ts";

const flattened = ({ name, type }: DeclaredParameter): readonly Parameter[] => {
  if (isValueType(type) || type.kind === "struct") {
    return [{ name, type }];
  }
  if (type.kind === "table") {
    return TABLE_PARTS[type.name].map((part) => ({
      name: `${name}.${part}`,
      type: { kind: "array", counted: false },
    }));
  }
  return type.kind === "array" ? [{ name, type: { kind: "array", counted: false } }] : [];
};

const readResult = (scope: Scope, node: ts.ReturnStatement | undefined): Expression | undefined => {
  const { returns, name, at } = scope.signature;
  if (returns === undefined) {
    if (node !== undefined) {
      throw new Refused(
        "early-return",
        spanOf(node),
        `\`${name}\` returns nothing; leave the \`return\` out`,
      );
    }
    return undefined;
  }
  if (node?.expression === undefined) {
    throw new Refused("early-return", at, `\`${name}\` does not end with the \`return\` of its value`);
  }
  return readTyped(scope, node.expression, returns);
};

const guarded = <T>(refusals: Refusal[], action: () => T): T | undefined => {
  try {
    return action();
  } catch (error) {
    if (!(error instanceof Refused)) {
      throw error;
    }
    refusals.push(error.refusal);
    return undefined;
  }
};

export const readFunction = (
  signature: Signature,
  declarations: Declarations,
  refusals: Refusal[],
): FunctionDefinition => {
  const scope: Scope = {
    declarations,
    signature,
    parameters: new Map(signature.parameters.map(({ name, type }) => [name, type])),
    blocks: [new Map()],
    refusals,
  };
  const statements = [...(signature.node.body?.statements ?? [])];
  const last = statements[statements.length - 1];
  const end = last !== undefined && compiler().isReturnStatement(last) ? last : undefined;
  const body = readStatements(scope, end === undefined ? statements : statements.slice(0, -1));
  const result = guarded(refusals, () => readResult(scope, end));
  return {
    name: signature.name,
    parameters: signature.parameters.flatMap(flattened),
    ...(signature.returns === undefined ? {} : { returns: signature.returns }),
    body,
    ...(result === undefined ? {} : { result }),
    resultComments: end === undefined ? [] : commentsAbove(end),
    doc: signature.doc,
    at: signature.at,
  };
};
