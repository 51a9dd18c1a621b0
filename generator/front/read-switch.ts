import type { ts } from "ts-morph";
import type { Statement, SwitchStatement } from "../ir/statement.ts";
import { compiler } from "./compiler.ts";
import { readExpression, readTyped } from "./read-expression.ts";
import { readStatements } from "./read-statement.ts";
import { shortened } from "./read-types.ts";
import { Refused } from "./refusals.ts";
import { inner, originOf, type Scope } from "./scope.ts";
import { commentsAbove, spanOf } from "./source.ts";

/** Statements of one clause without the `break`, which must be its last. */
const clauseBody = (clause: ts.CaseOrDefaultClause): readonly ts.Statement[] => {
  const { isBlock, isBreakStatement } = compiler();
  const only = clause.statements.length === 1 ? clause.statements[0] : undefined;
  const statements = only !== undefined && isBlock(only) ? [...only.statements] : [...clause.statements];
  const last = statements[statements.length - 1];
  if (last === undefined || !isBreakStatement(last)) {
    throw new Refused(
      "unsupported-statement",
      spanOf(clause),
      "a case ends with `break`; falling through cannot be compiled",
    );
  }
  return statements.slice(0, -1);
};

/** `switch` over an enumeration; cases without statements share the next one's. */
export const readSwitch = (scope: Scope, node: ts.SwitchStatement): Statement => {
  const { isCaseClause } = compiler();
  const subject = readExpression(scope, node.expression);
  if (subject.type.kind !== "enum") {
    throw new Refused(
      "unsupported-statement",
      spanOf(node.expression),
      `\`${shortened(node.expression)}\` is no enumeration`,
    );
  }
  const cases: SwitchStatement["cases"][number][] = [];
  let otherwise: readonly Statement[] = [];
  let members: string[] = [];
  for (const clause of node.caseBlock.clauses) {
    if (isCaseClause(clause)) {
      const member = readTyped(scope, clause.expression, subject.type);
      if (member.kind !== "member") {
        throw new Refused(
          "unsupported-statement",
          spanOf(clause.expression),
          "a case is one member of the enumeration",
        );
      }
      members.push(member.value);
      if (clause.statements.length > 0) {
        cases.push({ members, body: readStatements(inner(scope), clauseBody(clause)) });
        members = [];
      }
    } else {
      otherwise = readStatements(inner(scope), clauseBody(clause));
    }
  }
  return { kind: "switch", subject, cases, otherwise, comments: commentsAbove(node), origin: originOf(node) };
};
