import type { Expression } from "../ir/expression.ts";
import type { FunctionDefinition } from "../ir/program.ts";
import type { LocalStatement, Statement } from "../ir/statement.ts";
import { eachExpressionOf, eachStatement } from "../ir/walk.ts";
import { type Effects, isPure } from "../validate/effects.ts";
import { mapFunction } from "./map-function.ts";
import { tidySequence } from "./tidy-sequence.ts";

interface Uses {
  readonly reads: ReadonlyMap<string, number>;
  readonly writes: ReadonlySet<string>;
  readonly declared: ReadonlyMap<string, number>;
}

const usesOf = (definition: FunctionDefinition): Uses => {
  const reads = new Map<string, number>();
  const declared = new Map<string, number>();
  const writes = new Set<string>();
  const count = (map: Map<string, number>, name: string) => map.set(name, (map.get(name) ?? 0) + 1);
  eachExpressionOf(definition, (each) => {
    if (each.kind === "local") {
      count(reads, each.name);
    }
  });
  eachStatement(definition.body, (each) => {
    if (each.kind === "assign" && each.target.kind === "local") {
      writes.add(each.target.name);
    }
    if (each.kind === "local") {
      count(declared, each.name);
    }
  });
  return { reads, writes, declared };
};

const tidyStatement = (statement: Statement, uses: Uses, effects: Effects): readonly Statement[] => {
  const inside = (body: readonly Statement[]) => tidyBody(body, uses, effects);
  switch (statement.kind) {
    case "local":
      return tidyLocal(statement, uses, effects);
    case "assign": {
      const { target, value } = statement;
      const dead = target.kind === "local" && !uses.reads.has(target.name) && isPure(value, effects);
      return dead ? [] : [statement];
    }
    case "if": {
      const [whenTrue, whenFalse] = [inside(statement.whenTrue), inside(statement.whenFalse)];
      return whenTrue.length + whenFalse.length === 0 ? [] : [{ ...statement, whenTrue, whenFalse }];
    }
    case "switch": {
      const cases = statement.cases.map((each) => ({ ...each, body: inside(each.body) }));
      const otherwise = inside(statement.otherwise);
      const empty = cases.every((each) => each.body.length === 0) && otherwise.length === 0;
      return empty ? [] : [{ ...statement, cases, otherwise }];
    }
    case "for":
    case "block": {
      const body = inside(statement.body);
      return body.length === 0 ? [] : [{ ...statement, body }];
    }
    case "call":
      return [statement];
  }
};

const tidyLocal = (local: LocalStatement, uses: Uses, effects: Effects): readonly Statement[] => {
  const isWritten = uses.writes.has(local.name);
  if (uses.reads.has(local.name)) {
    return [{ ...local, mutable: isWritten }];
  }
  if (isPure(local.value, effects)) {
    return isWritten ? [local] : [];
  }
  return local.value.kind === "call" && !isWritten
    ? [{ kind: "call", call: local.value, comments: local.comments, origin: local.origin }]
    : [local];
};

const tidyBody = (body: readonly Statement[], uses: Uses, effects: Effects): readonly Statement[] =>
  tidySequence(
    body.flatMap((each) => tidyStatement(each, uses, effects)),
    effects,
  );

/** `const x = e; return x;` becomes `return e;`. */
const returned = (definition: FunctionDefinition): FunctionDefinition => {
  const { body, result } = definition;
  const last = body[body.length - 1];
  const isCopy =
    last?.kind === "local" && !last.mutable && result?.kind === "local" && result.name === last.name;
  return isCopy
    ? {
        ...definition,
        body: body.slice(0, -1),
        result: last.value,
        resultComments: [...last.comments, ...definition.resultComments],
      }
    : definition;
};

/** A constant local that only renames a parameter or another constant local, and is read once, is replaced by it. */
const withoutCopies = (definition: FunctionDefinition): FunctionDefinition => {
  const uses = usesOf(definition);
  const copies = new Map<string, Expression>();
  eachStatement(definition.body, (each) => {
    if (each.kind === "local" && each.value.kind === "local") {
      const once = uses.reads.get(each.name) === 1 && uses.declared.get(each.name) === 1;
      const fixed = !uses.writes.has(each.name) && !uses.writes.has(each.value.name);
      if (once && fixed) {
        copies.set(each.name, each.value);
      }
    }
  });
  return copies.size === 0 ? definition : replaceLocals(definition, copies);
};

const replaceLocals = (
  definition: FunctionDefinition,
  copies: ReadonlyMap<string, Expression>,
): FunctionDefinition => {
  const change = (each: Expression): Expression => {
    const copy = each.kind === "local" ? copies.get(each.name) : undefined;
    return copy === undefined ? each : change(copy);
  };
  return mapFunction(definition, change);
};

/** Removes what folding left behind: dead first values, locals nobody reads, empty branches, single-use copies. */
export const tidy = (definition: FunctionDefinition, effects: Effects): FunctionDefinition => {
  const plain = withoutCopies(definition);
  return returned({ ...plain, body: tidyBody(plain.body, usesOf(plain), effects) });
};
