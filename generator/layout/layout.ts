import type { Enumeration, Field, FieldType, Program } from "../ir/program.ts";
import type { Precision, StructRole } from "../lowered.ts";
import { namesOf } from "../print/names.ts";

export interface LayoutField {
  /** In the runtime; a dot stands before a part of a table. */
  readonly name: string;
  /** In generated C and TypeScript. */
  readonly printed: string;
  readonly type: FieldType;
}

export interface LayoutStruct {
  readonly name: string;
  readonly printed: string;
  readonly role: StructRole;
  /** The caller owns one: it is no part of another struct. */
  readonly outer: boolean;
  readonly fields: readonly LayoutField[];
}

export interface LayoutEntry {
  readonly function: string;
  readonly printed: string;
  readonly kind: "init" | "step" | "check";
  /** Structs in the order of the parameters, by runtime name. */
  readonly parameters: readonly { readonly name: string; readonly struct: string }[];
}

/** Names and shapes of a program's data, without its code: plain data that any thread can receive. */
export interface Layout {
  readonly stem: string;
  readonly precision: Precision;
  readonly structs: readonly LayoutStruct[];
  readonly entries: readonly LayoutEntry[];
  readonly enumerations: readonly Pick<Enumeration, "name" | "members">[];
  readonly calibrationStruct?: string;
}

const innerStructs = (program: Program): ReadonlySet<string> =>
  new Set(
    program.structs.flatMap(({ fields }) =>
      fields.flatMap(({ type }) => (type.kind === "struct" ? [type.name] : [])),
    ),
  );

const known = new WeakMap<Program, Layout>();

/** The layout of a program, worked out once. */
export const layoutOf = (program: Program): Layout => {
  const layout = known.get(program) ?? makeLayout(program);
  known.set(program, layout);
  return layout;
};

const makeLayout = (program: Program): Layout => {
  const inner = innerStructs(program);
  const names = namesOf(program);
  const field = ({ name, type }: Field): LayoutField => ({ name, printed: names.field(name), type });
  return {
    stem: program.name,
    precision: program.precision,
    structs: program.structs.map((struct) => ({
      name: struct.name,
      printed: names.struct(struct.name),
      role: struct.role,
      outer: !inner.has(struct.name),
      fields: struct.fields.map(field),
    })),
    entries: program.entries.map((entry) => ({
      function: entry.function,
      printed: names.function(entry.function),
      kind: entry.kind,
      parameters: (program.functions.find(({ name }) => name === entry.function)?.parameters ?? []).flatMap(
        ({ name, type }) => (type.kind === "struct" ? [{ name, struct: type.name }] : []),
      ),
    })),
    enumerations: program.enumerations.map(({ name, members }) => ({ name, members })),
    ...(program.calibrationStruct === undefined ? {} : { calibrationStruct: program.calibrationStruct }),
  };
};

export const layoutStruct = (layout: Layout, name: string): LayoutStruct => {
  const found = layout.structs.find((struct) => struct.name === name);
  if (found === undefined) {
    throw new Error(`internal: no struct ${name} in the layout`);
  }
  return found;
};
