import type { ts } from "ts-morph";
import type { Place } from "../ir/expression.ts";
import { compiler } from "./compiler.ts";
import { type DeclaredField, type DeclaredType, TABLE_PARTS, type TableName } from "./declarations.ts";
import { shortened } from "./read-types.ts";
import { Refused } from "./refusals.ts";
import type { Scope } from "./scope.ts";
import { spanOf } from "./source.ts";

export interface FoundPlace {
  readonly place: Place;
  readonly type: DeclaredType;
  /** Of the last field; absent for a bare parameter. */
  readonly field?: DeclaredField;
}

const partOf = (table: TableName, part: string, node: ts.Node): void => {
  if (!(TABLE_PARTS[table] as readonly string[]).includes(part)) {
    throw new Refused(
      "unknown-name",
      spanOf(node),
      `\`${table}\` has no \`${part}\`, only ${TABLE_PARTS[table].join(", ")}`,
    );
  }
};

/** A part of a table is a field, or a parameter, of its own: its name joined with a dot. */
export const joinPart = ({ root, fields }: Place, part: string): Place =>
  fields.length === 0
    ? { root: `${root}.${part}`, fields }
    : { root, fields: [...fields.slice(0, -1), `${fields[fields.length - 1]}.${part}`] };

const stepInto = (scope: Scope, outer: FoundPlace, node: ts.PropertyAccessExpression): FoundPlace => {
  const name = node.name.text;
  if (outer.type.kind === "table") {
    partOf(outer.type.name, name, node.name);
    return { ...outer, place: joinPart(outer.place, name), type: { kind: "array" } };
  }
  const declared =
    outer.type.kind === "struct" ? scope.declarations.interfaces.get(outer.type.name) : undefined;
  const field = declared?.fields.get(name);
  if (declared === undefined || field === undefined) {
    throw new Refused(
      "unknown-name",
      spanOf(node.name),
      `\`${shortened(node.expression)}\` has no field \`${name}\``,
    );
  }
  return {
    place: { root: outer.place.root, fields: [...outer.place.fields, name] },
    type: field.type,
    field,
  };
};

/** A parameter that is no plain value, or something inside it; undefined when the expression is nothing of the kind. */
export const findPlace = (scope: Scope, node: ts.Expression): FoundPlace | undefined => {
  if (compiler().isIdentifier(node)) {
    const type = scope.parameters.get(node.text);
    const isObject = type?.kind === "struct" || type?.kind === "array" || type?.kind === "table";
    return isObject ? { place: { root: node.text, fields: [] }, type } : undefined;
  }
  if (compiler().isPropertyAccessExpression(node) && node.questionDotToken === undefined) {
    const outer = findPlace(scope, node.expression);
    return outer === undefined ? undefined : stepInto(scope, outer, node);
  }
  return undefined;
};

export const findArray = (scope: Scope, node: ts.Expression): FoundPlace | undefined => {
  const found = findPlace(scope, node);
  return found?.type.kind === "array" ? found : undefined;
};
