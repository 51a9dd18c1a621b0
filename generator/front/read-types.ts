import type { ts } from "ts-morph";
import { COUNT, FLAG, REAL, type ValueType } from "../ir/expression.ts";
import { compiler } from "./compiler.ts";
import {
  type Declarations,
  type DeclaredField,
  type DeclaredInterface,
  type DeclaredType,
  isTableName,
  isValueType,
  STRUCTURE,
} from "./declarations.ts";
import { Refused } from "./refusals.ts";
import { documentationOf, spanOf } from "./source.ts";

const BASIC: Readonly<Record<string, ValueType>> = { Real: REAL, Count: COUNT, Flag: FLAG };

/** Names of types a file may refer to: known before their contents, since declarations may stand in any order. */
export interface TypeNames {
  readonly enumerations: ReadonlySet<string>;
  readonly interfaces: ReadonlySet<string>;
}

/** Members of a union of string literals; undefined for anything else. */
export const unionMembers = (node: ts.TypeNode): readonly string[] | undefined => {
  const { isUnionTypeNode, isLiteralTypeNode, isStringLiteral } = compiler();
  const parts = isUnionTypeNode(node) ? node.types : [node];
  const members = parts.flatMap((part) =>
    isLiteralTypeNode(part) && isStringLiteral(part.literal) ? [part.literal.text] : [],
  );
  return members.length === parts.length ? members : undefined;
};

const namedType = (node: ts.TypeNode, name: string, names: TypeNames): DeclaredType => {
  if (name in BASIC) {
    return BASIC[name];
  }
  if (isTableName(name)) {
    return { kind: "table", name };
  }
  if (name === STRUCTURE) {
    return { kind: "structure" };
  }
  if (names.enumerations.has(name)) {
    return { kind: "enum", name };
  }
  if (names.interfaces.has(name)) {
    return { kind: "struct", name };
  }
  throw new Refused("unsupported-type", spanOf(node), `\`${name}\` is no type that can be compiled`);
};

const isRealArray = (node: ts.TypeNode): boolean => {
  const { isArrayTypeNode, isTypeOperatorNode, isTypeReferenceNode, SyntaxKind } = compiler();
  const inner = isTypeOperatorNode(node) && node.operator === SyntaxKind.ReadonlyKeyword ? node.type : node;
  return (
    isArrayTypeNode(inner) && isTypeReferenceNode(inner.elementType) && inner.elementType.getText() === "Real"
  );
};

export const readType = (node: ts.TypeNode, names: TypeNames): DeclaredType => {
  if (isRealArray(node)) {
    return { kind: "array" };
  }
  if (compiler().isTypeReferenceNode(node) && node.typeArguments === undefined) {
    return namedType(node, node.typeName.getText(), names);
  }
  throw new Refused("unsupported-type", spanOf(node), `the type \`${shortened(node)}\` cannot be compiled`);
};

export const shortened = (node: ts.Node): string => {
  const text = node.getText().replace(/\s+/g, " ");
  return text.length > 40 ? `${text.slice(0, 37)}...` : text;
};

const isReadonly = (node: ts.PropertySignature): boolean =>
  (node.modifiers ?? []).some((each) => each.kind === compiler().SyntaxKind.ReadonlyKeyword);

const readField = (node: ts.TypeElement, names: TypeNames): DeclaredField => {
  if (!compiler().isPropertySignature(node) || node.type === undefined || node.questionToken !== undefined) {
    throw new Refused(
      "unsupported-type",
      spanOf(node),
      `the field \`${shortened(node)}\` cannot be compiled`,
    );
  }
  return {
    name: node.name.getText(),
    type: readType(node.type, names),
    readonly: isReadonly(node),
    doc: documentationOf(node),
    at: spanOf(node),
  };
};

export const readInterface = (node: ts.InterfaceDeclaration, names: TypeNames): DeclaredInterface => {
  if (node.heritageClauses !== undefined || node.typeParameters !== undefined) {
    throw new Refused(
      "unsupported-type",
      spanOf(node.name),
      "an interface cannot extend another or take parameters",
    );
  }
  const fields = node.members.map((member) => readField(member, names));
  return {
    name: node.name.text,
    fields: new Map(fields.map((field) => [field.name, field])),
    doc: documentationOf(node),
    at: spanOf(node.name),
  };
};

/** The structure's own fields may be unions without a name, since none of them is ever printed. */
export const readStructure = (
  node: ts.InterfaceDeclaration,
  names: TypeNames,
  declarations: Declarations,
): void => {
  for (const member of node.members) {
    if (!compiler().isPropertySignature(member) || member.type === undefined) {
      throw new Refused(
        "unsupported-type",
        spanOf(member),
        `the choice \`${shortened(member)}\` cannot be compiled`,
      );
    }
    const name = member.name.getText();
    const members = unionMembers(member.type);
    if (members === undefined) {
      const type = readType(member.type, names);
      if (!isValueType(type)) {
        throw new Refused(
          "unsupported-type",
          spanOf(member),
          "a choice of the structure is a flag, an enumeration or a number",
        );
      }
      declarations.structure.set(name, type);
    } else {
      const enumeration = `${STRUCTURE}.${name}`;
      declarations.enumerations.set(enumeration, { name: enumeration, members, doc: [] });
      declarations.structure.set(name, { kind: "enum", name: enumeration });
    }
  }
};
