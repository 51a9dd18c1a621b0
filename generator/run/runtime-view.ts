import { type Layout, type LayoutField, layoutStruct } from "../layout/layout.ts";
import type { StructObject } from "../layout/objects.ts";

const define = (view: StructObject, name: string, holder: StructObject, printed: string): void => {
  Object.defineProperty(view, name, {
    enumerable: true,
    get: () => holder[printed],
    set: (value: StructObject[string]) => {
      holder[printed] = value;
    },
  });
};

const addField = (layout: Layout, view: StructObject, object: StructObject, field: LayoutField): void => {
  const { name, printed, type } = field;
  const [outer, part] = name.split(".");
  if (type.kind === "struct") {
    view[name] = runtimeView(layout, type.name, object[printed] as StructObject);
  } else if (part === undefined) {
    define(view, name, object, printed);
  } else {
    view[outer] ??= {};
    define(view[outer] as StructObject, part, object, printed);
  }
};

/** The fields of a generated module's object under their runtime names; reads and writes go through to the object. */
export const runtimeView = (layout: Layout, struct: string, object: StructObject): StructObject => {
  const view: StructObject = {};
  for (const field of layoutStruct(layout, struct).fields) {
    addField(layout, view, object, field);
  }
  return view;
};
