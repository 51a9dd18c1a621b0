import type { ts } from "ts-morph";
import type { Span } from "../../spec/index.ts";
import type { ValueType } from "../ir/expression.ts";
import type { Enumeration } from "../ir/program.ts";

/** A type as written, before tables are taken apart. */
export type DeclaredType =
  | ValueType
  | { readonly kind: "struct"; readonly name: string }
  | { readonly kind: "array" }
  | { readonly kind: "table"; readonly name: TableName }
  | { readonly kind: "structure" };

/** Interfaces of arrays only, whose parts become fields or parameters of their own. */
export const TABLE_PARTS = {
  Curve: ["axis", "values"],
  Table2: ["rows", "columns", "values"],
} as const;
export type TableName = keyof typeof TABLE_PARTS;

export const isTableName = (name: string): name is TableName => name in TABLE_PARTS;

export const STRUCTURE = "Structure";

export interface DeclaredField {
  readonly name: string;
  readonly type: DeclaredType;
  readonly readonly: boolean;
  readonly doc: readonly string[];
  readonly at: Span;
}

export interface DeclaredInterface {
  readonly name: string;
  readonly fields: ReadonlyMap<string, DeclaredField>;
  readonly doc: readonly string[];
  readonly at: Span;
}

export interface DeclaredConstant {
  readonly name: string;
  readonly type: ValueType;
  readonly value: number;
  readonly doc: readonly string[];
  readonly at: Span;
}

export interface DeclaredParameter {
  readonly name: string;
  readonly type: DeclaredType;
}

export interface Signature {
  readonly name: string;
  readonly parameters: readonly DeclaredParameter[];
  readonly returns?: ValueType;
  readonly node: ts.FunctionDeclaration;
  readonly doc: readonly string[];
  readonly at: Span;
}

export interface Declarations {
  readonly enumerations: Map<string, Enumeration>;
  readonly interfaces: Map<string, DeclaredInterface>;
  readonly structure: Map<string, ValueType>;
  readonly constants: Map<string, DeclaredConstant>;
  readonly functions: Map<string, Signature>;
}

export const isValueType = (type: DeclaredType): type is ValueType =>
  type.kind === "real" || type.kind === "count" || type.kind === "flag" || type.kind === "enum";
