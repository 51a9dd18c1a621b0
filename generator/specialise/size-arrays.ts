import type { Place } from "../ir/expression.ts";
import { COUNT } from "../ir/expression.ts";
import { type FunctionDefinition, findStruct, type Struct } from "../ir/program.ts";
import { stepsOf } from "./liveness.ts";
import { mapFunction } from "./map-function.ts";

/** Length of an array that is a field; undefined for a parameter, whose length its caller knows. */
const sizeAt = (structs: readonly Struct[], owner: FunctionDefinition, place: Place): number | undefined => {
  const last = stepsOf({ structs }, owner, place).pop();
  if (last === undefined) {
    return undefined;
  }
  const type = findStruct({ structs }, last.struct).fields.find(({ name }) => name === last.field)?.type;
  return type?.kind === "array" ? type.size : undefined;
};

/** Puts the lengths that the spec gives to array fields into the code. */
export const sizeArrays = (definition: FunctionDefinition, structs: readonly Struct[]): FunctionDefinition =>
  mapFunction(
    definition,
    (each) => {
      const size = each.kind === "length" ? sizeAt(structs, definition, each.place) : undefined;
      return size === undefined ? each : { kind: "count", value: size, type: COUNT, origin: each.origin };
    },
    (call) => ({
      ...call,
      arguments: call.arguments.map((argument) => {
        const size = argument.kind === "array" ? sizeAt(structs, definition, argument.place) : undefined;
        return argument.kind === "array" && size !== undefined ? { ...argument, size } : argument;
      }),
    }),
  );
