import type { Argument, Place, ValueType } from "../ir/expression.ts";
import type { OperatorName } from "../ir/operators.ts";
import type { FunctionDefinition, ParameterType } from "../ir/program.ts";

/** Printed code; `atomic` needs no parentheses inside a larger expression. */
export interface Printed {
  readonly text: string;
  readonly atomic: boolean;
  /** The sign that a chain of equal logical operators was made with. */
  readonly chain?: string;
}

export type Spelling = (operands: readonly Printed[]) => Printed;

/** What differs between the printed languages; the order and shape of statements is shared. */
export interface Dialect {
  readonly spell: Readonly<Record<OperatorName, Spelling>>;
  readonly real: (value: number) => Printed;
  readonly member: (type: ValueType, member: string) => string;
  readonly constant: (name: string) => string;
  readonly local: (name: string) => string;
  /** A value or array at a place; `owner` gives the types of the parameters. */
  readonly place: (owner: FunctionDefinition, place: Place) => string;
  readonly length: (place: Place) => string;
  /** An argument, and a length after it where the callee needs one. */
  readonly argument: (
    owner: FunctionDefinition,
    argument: Argument,
    parameter: ParameterType,
  ) => readonly string[];
  readonly function: (name: string) => string;
  readonly declare: (type: ValueType, name: string, mutable: boolean) => string;
  readonly countFrom: (name: string, from: string) => string;
}

export const atom = (text: string): Printed => ({ text, atomic: true });

/** As an operand: in parentheses unless it is atomic, so that the order of rounding is on the page. */
export const operand = ({ text, atomic }: Printed): string => (atomic ? text : `(${text})`);

export const infix =
  (sign: string): Spelling =>
  ([a, b]) => ({ text: `${operand(a)} ${sign} ${operand(b)}`, atomic: false });

/** `a && b && c` needs no inner parentheses: the order of logical operators changes no value. */
export const chained =
  (sign: string): Spelling =>
  ([a, b]) => ({
    text: `${a.chain === sign ? a.text : operand(a)} ${sign} ${operand(b)}`,
    atomic: false,
    chain: sign,
  });

export const prefix =
  (sign: string): Spelling =>
  ([a]) => ({ text: `${sign}${operand(a)}`, atomic: true });

export const called =
  (name: string): Spelling =>
  (operands) =>
    atom(`${name}(${operands.map(({ text }) => text).join(", ")})`);

export const selection: Spelling = ([condition, a, b]) => ({
  text: `${operand(condition)} ? ${operand(a)} : ${operand(b)}`,
  atomic: false,
});
