import type { CallExpression, Expression, Origin, Place, ValueType } from "./expression.ts";

interface Common {
  /** Sentences that stand above the statement in the runtime. */
  readonly comments: readonly string[];
  readonly origin: Origin;
}

export interface LocalStatement extends Common {
  readonly kind: "local";
  readonly name: string;
  readonly type: ValueType;
  /** Assigned again later. */
  readonly mutable: boolean;
  readonly value: Expression;
}

export type Target =
  | { readonly kind: "local"; readonly name: string }
  | { readonly kind: "field"; readonly place: Place }
  | { readonly kind: "element"; readonly place: Place; readonly index: Expression };

export interface AssignStatement extends Common {
  readonly kind: "assign";
  readonly target: Target;
  readonly value: Expression;
}

export interface IfStatement extends Common {
  readonly kind: "if";
  readonly condition: Expression;
  readonly whenTrue: readonly Statement[];
  readonly whenFalse: readonly Statement[];
}

export interface SwitchStatement extends Common {
  readonly kind: "switch";
  readonly subject: Expression;
  readonly cases: readonly { readonly members: readonly string[]; readonly body: readonly Statement[] }[];
  readonly otherwise: readonly Statement[];
}

/** `for (let variable = from; variable < below; variable++)`. */
export interface ForStatement extends Common {
  readonly kind: "for";
  readonly variable: string;
  readonly from: Expression;
  readonly below: Expression;
  readonly body: readonly Statement[];
}

export interface CallStatement extends Common {
  readonly kind: "call";
  readonly call: CallExpression;
}

/** Left of a branch that the structure chose, when its names would clash outside. */
export interface BlockStatement extends Common {
  readonly kind: "block";
  readonly body: readonly Statement[];
}

export type Statement =
  | LocalStatement
  | AssignStatement
  | IfStatement
  | SwitchStatement
  | ForStatement
  | CallStatement
  | BlockStatement;
