import type { Expression, Place } from "../ir/expression.ts";
import type { AssignStatement, IfStatement, LocalStatement, Statement } from "../ir/statement.ts";
import { eachCallOf, eachExpression, eachStatement, expressionsOf } from "../ir/walk.ts";
import { type Effects, isPure, isPureCall } from "../validate/effects.ts";

const reads = (expression: Expression, name: string): boolean => {
  let found = false;
  eachExpression(expression, (each) => {
    found ||= each.kind === "local" && each.name === name;
  });
  return found;
};

/** Whether a statement, or one inside it, reads or assigns a local. */
const mentions = (statement: Statement, name: string): boolean => {
  let found = false;
  eachStatement([statement], (each) => {
    found ||= each.kind === "assign" && each.target.kind === "local" && each.target.name === name;
    found ||= expressionsOf(each).some((root) => reads(root, name));
  });
  return found;
};

/** The assignment that overwrites a local's first value before anything has read it. */
const overwriteOf = (local: LocalStatement, later: readonly Statement[]): AssignStatement | undefined => {
  const next = later.find((each) => mentions(each, local.name));
  const isOverwrite =
    next?.kind === "assign" &&
    next.target.kind === "local" &&
    next.target.name === local.name &&
    !reads(next.value, local.name);
  return isOverwrite ? next : undefined;
};

/** `let x = a; ... x = b;` becomes `let x = b;` there: what a chosen branch leaves behind. */
const withoutOverwrites = (body: readonly Statement[], effects: Effects): readonly Statement[] => {
  const moved = new Map<Statement, LocalStatement>();
  const kept = body.filter((statement, i) => {
    const plain = statement.kind === "local" && isPure(statement.value, effects) ? statement : undefined;
    const overwrite = plain && overwriteOf(plain, body.slice(i + 1));
    if (plain !== undefined && overwrite !== undefined) {
      const comments = [...plain.comments, ...overwrite.comments];
      moved.set(overwrite, { ...plain, value: overwrite.value, origin: overwrite.origin, comments });
    }
    return overwrite === undefined;
  });
  return kept.map((statement) => moved.get(statement) ?? statement);
};

/** An expression without its origins, to compare what it says. */
const said = (expression: Expression): string =>
  JSON.stringify(expression, (key, value: unknown) => (key === "origin" ? undefined : value));

/** Locals and roots of places that a condition depends on. */
const rootsOf = (expression: Expression): ReadonlySet<string> => {
  const roots = new Set<string>();
  const note = (place: Place) => roots.add(place.root);
  eachExpression(expression, (each) => {
    if (each.kind === "local") {
      roots.add(each.name);
    } else if (each.kind === "field" || each.kind === "element") {
      note(each.place);
    }
  });
  return roots;
};

/** Whether some statements may change what an expression over these roots gives. */
const mayChange = (body: readonly Statement[], roots: ReadonlySet<string>, effects: Effects): boolean => {
  let changes = false;
  eachStatement(body, (each) => {
    if (each.kind === "assign") {
      changes ||= roots.has(each.target.kind === "local" ? each.target.name : each.target.place.root);
    }
  });
  eachCallOf({ body }, (call) => {
    changes ||= !isPureCall(call, effects);
  });
  return changes;
};

const mergeable = (first: Statement | undefined, second: Statement, effects: Effects): first is IfStatement =>
  first?.kind === "if" &&
  second.kind === "if" &&
  first.whenFalse.length + second.whenFalse.length === 0 &&
  isPure(first.condition, effects) &&
  said(first.condition) === said(second.condition) &&
  !mayChange(first.whenTrue, rootsOf(first.condition), effects);

/** `if (c) { a } if (c) { b }` becomes `if (c) { a b }` when `a` leaves `c` alone. */
const mergedConditions = (body: readonly Statement[], effects: Effects): readonly Statement[] => {
  const out: Statement[] = [];
  for (const statement of body) {
    const before = out[out.length - 1];
    if (statement.kind === "if" && mergeable(before, statement, effects)) {
      out[out.length - 1] = { ...before, whenTrue: [...before.whenTrue, ...statement.whenTrue] };
    } else {
      out.push(statement);
    }
  }
  return out;
};

export const tidySequence = (body: readonly Statement[], effects: Effects): readonly Statement[] =>
  mergedConditions(withoutOverwrites(body, effects), effects);
