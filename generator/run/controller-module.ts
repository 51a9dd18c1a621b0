import { type InterpretedFunction, interpretProgram } from "../interpret/interpret-program.ts";
import type { Value } from "../interpret/operations.ts";
import type { Program } from "../ir/program.ts";
import { type Layout, layoutOf } from "../layout/layout.ts";
import { createCalibration, createStruct, type Naming, type StructObject } from "../layout/objects.ts";
import { snakeCase } from "../print/identifiers.ts";

/** A controller that can be run in this process, whatever runs it; its data are plain objects of the caller's. */
export interface ControllerModule {
  readonly layout: Layout;
  /** Names that the objects' fields carry. */
  readonly naming: Naming;
  /** The calibration as specified, in the controller's precision. */
  readonly createCalibration: () => StructObject;
  /** A struct of the layout by its runtime name, every value zero, false or the first member. */
  readonly create: (struct: string) => StructObject;
  /** An entry, by its runtime name, tied to its objects, by struct; values in them must be rounded to the precision. */
  readonly bind: (entry: string, objects: Readonly<Record<string, StructObject>>) => () => Value;
}

const bound = (
  layout: Layout,
  entry: string,
  run: InterpretedFunction,
  objects: Readonly<Record<string, StructObject>>,
): (() => Value) => {
  const parameters = layout.entries.find((each) => each.function === entry)?.parameters ?? [];
  const given = parameters.map(({ struct }) => {
    const object = objects[struct];
    if (object === undefined) {
      throw new Error(`\`${entry}\` needs a ${struct}`);
    }
    return object;
  });
  // Written out: a spread would cost more than a small controller's step.
  const [a, b, c, d, e, g, h, i] = given;
  return () => run(a, b, c, d, e, g, h, i);
};

const functionOf = <T>(from: Readonly<Record<string, T>>, name: string): T => {
  const found = from[name];
  if (found === undefined) {
    throw new Error(`the controller has no \`${name}\``);
  }
  return found;
};

/** The reference interpreter as a module; `after` runs after every statement. */
export const interpretedModule = (program: Program, after?: () => void): ControllerModule => {
  const layout = layoutOf(program);
  const entries = interpretProgram(program, program.precision, after);
  return {
    layout,
    naming: "runtime",
    createCalibration: () => createCalibration(layout, program.calibration, "runtime"),
    create: (struct) => createStruct(layout, struct, "runtime"),
    bind: (entry, objects) => bound(layout, entry, functionOf(entries, entry), objects),
  };
};

/** Exports of a generated TypeScript module. */
export type GeneratedExports = Readonly<
  Record<string, (...structs: readonly StructObject[]) => Value & StructObject>
>;

/** A generated module, once loaded, as a controller. */
export const generatedModule = (layout: Layout, exported: GeneratedExports): ControllerModule => {
  const create = (struct: string): StructObject => functionOf(exported, `create_${snakeCase(struct)}`)();
  return {
    layout,
    naming: "printed",
    createCalibration: () => (layout.calibrationStruct === undefined ? {} : create(layout.calibrationStruct)),
    create,
    bind: (entry, objects) => {
      const printed = layout.entries.find((each) => each.function === entry)?.printed ?? entry;
      return bound(layout, entry, functionOf(exported, printed), objects);
    },
  };
};
