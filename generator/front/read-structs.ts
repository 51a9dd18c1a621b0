import type { Field, FieldType, Struct } from "../ir/program.ts";
import type { Lowered, StructRole } from "../lowered.ts";
import { type DeclaredField, type DeclaredInterface, isValueType, TABLE_PARTS } from "./declarations.ts";

const fieldsOf = (owner: string, field: DeclaredField, sizes: Lowered["arraySizes"]): readonly Field[] => {
  const { name, type, doc, at } = field;
  const array = (key: string): FieldType => ({ kind: "array", size: sizes[key] ?? 0 });
  if (type.kind === "table") {
    return TABLE_PARTS[type.name].map((part, i) => ({
      name: `${name}.${part}`,
      type: array(`${owner}.${name}.${part}`),
      doc: i === 0 ? doc : [],
      at,
    }));
  }
  if (type.kind === "array") {
    return [{ name, type: array(`${owner}.${name}`), doc, at }];
  }
  return isValueType(type) || type.kind === "struct" ? [{ name, type, doc, at }] : [];
};

/** Interfaces as structs with flat tables, inner ones first; those that no role reaches are left out. */
export const readStructs = (
  interfaces: ReadonlyMap<string, DeclaredInterface>,
  lowered: Lowered,
): readonly Struct[] => {
  const done = new Map<string, Struct>();
  const visit = (declared: DeclaredInterface | undefined, role: StructRole): void => {
    if (declared === undefined || done.has(declared.name)) {
      return;
    }
    for (const { type } of declared.fields.values()) {
      if (type.kind === "struct") {
        visit(interfaces.get(type.name), role);
      }
    }
    done.set(declared.name, {
      name: declared.name,
      role,
      fields: [...declared.fields.values()].flatMap((field) =>
        fieldsOf(declared.name, field, lowered.arraySizes),
      ),
      doc: declared.doc,
      at: declared.at,
    });
  };
  for (const [name, role] of Object.entries(lowered.roles)) {
    visit(interfaces.get(name), role);
  }
  return [...done.values()];
};
