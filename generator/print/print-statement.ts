import type { Expression } from "../ir/expression.ts";
import type { FunctionDefinition } from "../ir/program.ts";
import type { AssignStatement, IfStatement, Statement, SwitchStatement } from "../ir/statement.ts";
import { blockComment } from "./comment-text.ts";
import { printCall, printExpression, type Surroundings } from "./print-expression.ts";
import { wrap } from "./wrap.ts";

const STEP = "    ";

const text = (around: Surroundings, expression: Expression): string =>
  printExpression(around, expression).text;

const printTarget = (around: Surroundings, { target }: AssignStatement): string => {
  const { dialect, owner } = around;
  switch (target.kind) {
    case "local":
      return dialect.local(target.name);
    case "field":
      return dialect.place(owner, target.place);
    case "element":
      return `${dialect.place(owner, target.place)}[${text(around, target.index)}]`;
  }
};

/** `before` closes the branch that this one continues: `} else `. */
const printIf = (
  around: Surroundings,
  statement: IfStatement,
  indent: string,
  before: string,
): readonly string[] => {
  const { whenTrue, whenFalse } = statement;
  const negated = whenTrue.length === 0;
  const printed = printExpression(around, statement.condition);
  const condition = negated ? around.dialect.spell.not([printed]).text : printed.text;
  return [
    ...wrap(`${indent}${before}if (${condition}) {`),
    ...printBody(around, negated ? whenFalse : whenTrue, indent + STEP),
    ...printElse(around, negated ? [] : whenFalse, indent, before !== ""),
  ];
};

/** A branch that is one `if` without sentences of its own continues as `else if`. */
const continues = (body: readonly Statement[]): body is readonly [IfStatement] =>
  body.length === 1 && body[0].kind === "if" && body[0].comments.length === 0;

/** A chain of `else if` ends with an `else`, so that a reader sees that nothing was forgotten. */
const printElse = (
  around: Surroundings,
  body: readonly Statement[],
  indent: string,
  isChain: boolean,
): readonly string[] => {
  if (body.length === 0) {
    return isChain
      ? [`${indent}} else {`, `${indent}${STEP}/* nothing to do */`, `${indent}}`]
      : [`${indent}}`];
  }
  return continues(body)
    ? printIf(around, body[0], indent, "} else ")
    : [`${indent}} else {`, ...printBody(around, body, indent + STEP), `${indent}}`];
};

const printSwitch = (around: Surroundings, statement: SwitchStatement, indent: string): readonly string[] => {
  const [label, inside] = [`${indent}${STEP}`, `${indent}${STEP}${STEP}`];
  const body = (statements: readonly Statement[]) => [
    ...printBody(around, statements, inside),
    `${inside}break;`,
  ];
  return [
    ...wrap(`${indent}switch (${text(around, statement.subject)}) {`),
    ...statement.cases.flatMap(({ members, body: statements }) => [
      ...members.map((member) => `${label}case ${around.dialect.member(statement.subject.type, member)}:`),
      ...body(statements),
    ]),
    `${label}default:`,
    ...body(statement.otherwise),
    `${indent}}`,
  ];
};

const printStatement = (around: Surroundings, statement: Statement, indent: string): readonly string[] => {
  const { dialect } = around;
  switch (statement.kind) {
    case "local": {
      const head = dialect.declare(statement.type, statement.name, statement.mutable);
      return wrap(`${indent}${head} = ${text(around, statement.value)};`);
    }
    case "assign":
      return wrap(`${indent}${printTarget(around, statement)} = ${text(around, statement.value)};`);
    case "if":
      return printIf(around, statement, indent, "");
    case "switch":
      return printSwitch(around, statement, indent);
    case "for": {
      const variable = dialect.local(statement.variable);
      const from = dialect.countFrom(statement.variable, text(around, statement.from));
      const head = `for (${from}; ${variable} < ${printBelow(around, statement.below)}; ${variable}++) {`;
      return [`${indent}${head}`, ...printBody(around, statement.body, indent + STEP), `${indent}}`];
    }
    case "call":
      return wrap(`${indent}${printCall(around, statement.call)};`);
    case "block":
      return [`${indent}{`, ...printBody(around, statement.body, indent + STEP), `${indent}}`];
  }
};

const printBelow = (around: Surroundings, below: Expression): string => {
  const printed = printExpression(around, below);
  return printed.atomic ? printed.text : `(${printed.text})`;
};

export const printBody = (
  around: Surroundings,
  body: readonly Statement[],
  indent: string,
): readonly string[] =>
  body.flatMap((statement) => [
    ...blockComment(statement.comments, indent),
    ...printStatement(around, statement, indent),
  ]);

/** The lines between a function's braces, the same in every language but for spelling. */
export const printFunctionBody = (
  around: Surroundings,
  definition: FunctionDefinition,
): readonly string[] => [
  ...printBody(around, definition.body, STEP),
  ...blockComment(definition.resultComments, STEP),
  ...(definition.result === undefined ? [] : wrap(`${STEP}return ${text(around, definition.result)};`)),
];
