import type { Span } from "../../spec/index.ts";
import type { OperatorName } from "./operators.ts";

export type ValueType =
  | { readonly kind: "real" }
  | { readonly kind: "count" }
  | { readonly kind: "flag" }
  | { readonly kind: "enum"; readonly name: string };

/** Both places a node came from: the runtime, and the spec for a value that the spec sets. */
export interface Origin {
  readonly runtime: Span;
  readonly spec?: Span;
}

/** A parameter, or a field somewhere inside it. */
export interface Place {
  readonly root: string;
  readonly fields: readonly string[];
}

export type Literal =
  | { readonly kind: "real"; readonly value: number; readonly type: ValueType; readonly origin: Origin }
  | { readonly kind: "count"; readonly value: number; readonly type: ValueType; readonly origin: Origin }
  | { readonly kind: "flag"; readonly value: boolean; readonly type: ValueType; readonly origin: Origin }
  | { readonly kind: "member"; readonly value: string; readonly type: ValueType; readonly origin: Origin };

export type Argument =
  | { readonly kind: "value"; readonly value: Expression }
  | { readonly kind: "struct"; readonly place: Place; readonly struct: string }
  /** `size` is absent when the array is a parameter itself. */
  | { readonly kind: "array"; readonly place: Place; readonly size?: number };

export interface CallExpression {
  readonly kind: "call";
  readonly function: string;
  readonly arguments: readonly Argument[];
  readonly type: ValueType | undefined;
  readonly origin: Origin;
}

export type Expression =
  | Literal
  /** A choice of the spec; gone after specialisation, but for numbers, which become constants. */
  | { readonly kind: "structure"; readonly field: string; readonly type: ValueType; readonly origin: Origin }
  | {
      readonly kind: "constant";
      readonly name: string;
      readonly value: number;
      readonly type: ValueType;
      readonly origin: Origin;
    }
  /** A local or a parameter that holds a value. */
  | { readonly kind: "local"; readonly name: string; readonly type: ValueType; readonly origin: Origin }
  | { readonly kind: "field"; readonly place: Place; readonly type: ValueType; readonly origin: Origin }
  | {
      readonly kind: "element";
      readonly place: Place;
      readonly index: Expression;
      readonly type: ValueType;
      readonly origin: Origin;
    }
  | { readonly kind: "length"; readonly place: Place; readonly type: ValueType; readonly origin: Origin }
  | {
      readonly kind: "operation";
      readonly operator: OperatorName;
      readonly operands: readonly Expression[];
      readonly type: ValueType;
      readonly origin: Origin;
    }
  | (CallExpression & { readonly type: ValueType });

export const REAL: ValueType = { kind: "real" };
export const COUNT: ValueType = { kind: "count" };
export const FLAG: ValueType = { kind: "flag" };

export const sameType = (a: ValueType, b: ValueType): boolean =>
  a.kind === b.kind && (a.kind !== "enum" || b.kind !== "enum" || a.name === b.name);

export const isLiteral = (expression: Expression): expression is Literal =>
  expression.kind === "real" ||
  expression.kind === "count" ||
  expression.kind === "flag" ||
  expression.kind === "member";
