import type { Expression } from "../ir/expression.ts";
import { isLiteral } from "../ir/expression.ts";
import type { FunctionDefinition } from "../ir/program.ts";
import type { LocalStatement, Statement } from "../ir/statement.ts";
import { eachStatement, mapCall } from "../ir/walk.ts";
import { constantValue, fold, type Known } from "./known.ts";

const declaredNames = (body: readonly Statement[]): readonly string[] => {
  const names: string[] = [];
  eachStatement(body, (each) => {
    if (each.kind === "local") {
      names.push(each.name);
    } else if (each.kind === "for") {
      names.push(each.variable);
    }
  });
  return names;
};

/** A branch that the structure chose, opened into its surroundings unless a name would then be declared twice. */
const opened = (
  body: readonly Statement[],
  outer: Statement,
  names: ReadonlyMap<string, number>,
): readonly Statement[] => {
  const clashes = declaredNames(body).some((name) => (names.get(name) ?? 0) > 1);
  if (clashes) {
    return [{ kind: "block", body, comments: outer.comments, origin: outer.origin }];
  }
  return body.map((each, i) =>
    i === 0 ? { ...each, comments: [...outer.comments, ...each.comments] } : each,
  );
};

/** A Flag, Count or enumeration that is constant is worth following: it may decide a branch. Reals keep their names. */
const isFollowed = ({ type, mutable, value }: LocalStatement): boolean =>
  !mutable && type.kind !== "real" && isLiteral(value);

export const foldFunction = (known: Known, definition: FunctionDefinition): FunctionDefinition => {
  const locals = new Map<string, Expression>(known.locals);
  const inside: Known = { ...known, locals };
  const counts = new Map<string, number>();
  for (const name of declaredNames(definition.body)) {
    counts.set(name, (counts.get(name) ?? 0) + 1);
  }
  const folded = (expression: Expression) => fold(inside, expression);

  const foldBody = (body: readonly Statement[]): readonly Statement[] => body.flatMap(foldStatement);

  const foldStatement = (statement: Statement): readonly Statement[] => {
    switch (statement.kind) {
      case "local": {
        const local = { ...statement, value: folded(statement.value) };
        const follow = isFollowed(local) && counts.get(local.name) === 1;
        if (follow) {
          locals.set(local.name, local.value);
        }
        return follow ? [] : [local];
      }
      case "assign": {
        const { target } = statement;
        const index = target.kind === "element" ? { ...target, index: folded(target.index) } : target;
        return [{ ...statement, target: index, value: folded(statement.value) }];
      }
      case "if": {
        const condition = folded(statement.condition);
        const value = constantValue(condition);
        if (value !== undefined) {
          return opened(foldBody(value ? statement.whenTrue : statement.whenFalse), statement, counts);
        }
        return [
          {
            ...statement,
            condition,
            whenTrue: foldBody(statement.whenTrue),
            whenFalse: foldBody(statement.whenFalse),
          },
        ];
      }
      case "switch": {
        const subject = folded(statement.subject);
        const value = constantValue(subject);
        if (value !== undefined) {
          const chosen = statement.cases.find((each) => each.members.includes(value as string));
          return opened(foldBody(chosen?.body ?? statement.otherwise), statement, counts);
        }
        const cases = statement.cases.map((each) => ({ ...each, body: foldBody(each.body) }));
        return [{ ...statement, subject, cases, otherwise: foldBody(statement.otherwise) }];
      }
      case "for": {
        const [from, below] = [folded(statement.from), folded(statement.below)];
        return [{ ...statement, from, below, body: foldBody(statement.body) }];
      }
      case "call":
        return [{ ...statement, call: mapCall(statement.call, folded) }];
      case "block":
        return opened(foldBody(statement.body), statement, counts);
    }
  };

  const body = foldBody(definition.body);
  return {
    ...definition,
    body,
    ...(definition.result === undefined ? {} : { result: folded(definition.result) }),
  };
};
