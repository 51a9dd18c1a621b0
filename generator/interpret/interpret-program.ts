import type { FunctionDefinition, Program } from "../ir/program.ts";
import { eachStatement } from "../ir/walk.ts";
import type { StructObject } from "../layout/objects.ts";
import type { Precision } from "../lowered.ts";
import { type Call, type Frame, interpretExpression } from "./interpret-expression.ts";
import { interpretBody, type StatementSurroundings } from "./interpret-statement.ts";
import { operations, type Value } from "./operations.ts";

/** A function of the program; structs are objects with the runtime's field names, in the order of its parameters. */
export type InterpretedFunction = (...structs: readonly StructObject[]) => Value;

const slotsOf = (definition: FunctionDefinition): ReadonlyMap<string, number> => {
  const slots = new Map(definition.parameters.map(({ name }, i) => [name, i]));
  eachStatement(definition.body, (each) => {
    const name = each.kind === "local" ? each.name : each.kind === "for" ? each.variable : undefined;
    if (name !== undefined && !slots.has(name)) {
      slots.set(name, slots.size);
    }
  });
  return slots;
};

const interpretFunction = (definition: FunctionDefinition, around: StatementSurroundings): Call => {
  const body = interpretBody(around, definition.body);
  const result = definition.result === undefined ? undefined : interpretExpression(around, definition.result);
  return (frame: Frame) => {
    body(frame);
    return result === undefined ? 0 : result(frame);
  };
};

/**
 * The reference: runs the IR as it stands, one closure per node. `precision` must be the program's own, since its
 * constants are rounded already. `after` runs after every statement.
 */
export const interpretProgram = (
  program: Program,
  precision: Precision,
  after?: () => void,
): Readonly<Record<string, InterpretedFunction>> => {
  if (precision !== program.precision) {
    throw new Error(`the program was compiled for ${program.precision}, not ${precision}`);
  }
  const table = operations(precision);
  const calls = new Map<string, Call>();
  const slots = new Map(program.functions.map((each) => [each.name, slotsOf(each)]));
  const call = (name: string): Call => {
    const found = calls.get(name);
    if (found === undefined) {
      throw new Error(`internal: no function ${name}`);
    }
    return found;
  };
  const frameSize = (name: string) => slots.get(name)?.size ?? 0;
  for (const definition of program.functions) {
    const own = slots.get(definition.name) ?? new Map();
    calls.set(definition.name, interpretFunction(definition, { slots: own, table, call, frameSize, after }));
  }
  return Object.fromEntries(
    program.entries.map((entry) => [
      entry.function,
      (...structs: readonly StructObject[]) => call(entry.function)([...structs]),
    ]),
  );
};
