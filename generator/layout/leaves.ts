import type { ValueType } from "../ir/expression.ts";
import { type Layout, type LayoutField, layoutStruct } from "./layout.ts";

/** One value, or one array of reals, somewhere in a struct. */
export interface Leaf {
  /** Field names down to it, as in the runtime; parts of tables are names of their own. */
  readonly runtime: readonly string[];
  readonly printed: readonly string[];
  readonly type: ValueType | { readonly kind: "array"; readonly size: number };
  /** Number of the leaf's first value among all values of the struct. */
  readonly index: number;
}

export const sizeOfLeaf = ({ type }: Pick<Leaf, "type">): number => (type.kind === "array" ? type.size : 1);

/** Every value of a struct in declaration order, inner structs in place. */
export const leavesOf = (layout: Layout, structName: string): readonly Leaf[] => {
  const leaves: Leaf[] = [];
  let index = 0;
  const visit = (field: LayoutField, runtime: readonly string[], printed: readonly string[]): void => {
    const { type } = field;
    const path = { runtime: [...runtime, ...field.name.split(".")], printed: [...printed, field.printed] };
    if (type.kind === "struct") {
      for (const inner of layoutStruct(layout, type.name).fields) {
        visit(inner, path.runtime, path.printed);
      }
    } else {
      leaves.push({ ...path, type, index });
      index += type.kind === "array" ? type.size : 1;
    }
  };
  for (const field of layoutStruct(layout, structName).fields) {
    visit(field, [], []);
  }
  return leaves;
};
