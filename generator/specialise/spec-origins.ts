import type { Expression } from "../ir/expression.ts";
import type { FunctionDefinition } from "../ir/program.ts";
import type { Lowered } from "../lowered.ts";
import { mapFunction } from "./map-function.ts";

/** Gives every read of the calibration struct the place in the spec that set the value. */
export const withSpecOrigins = (
  definition: FunctionDefinition,
  calibrationStruct: string | undefined,
  info: Lowered["calibrationInfo"],
): FunctionDefinition => {
  const roots = new Set(
    definition.parameters.flatMap(({ name, type }) =>
      type.kind === "struct" && type.name === calibrationStruct ? [name] : [],
    ),
  );
  return mapFunction(definition, (each): Expression => {
    const isRead = (each.kind === "field" || each.kind === "element") && roots.has(each.place.root);
    const spec = isRead ? info[each.place.fields.join(".")]?.at : undefined;
    return spec === undefined ? each : { ...each, origin: { ...each.origin, spec } };
  });
};
