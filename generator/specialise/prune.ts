import type { CallExpression } from "../ir/expression.ts";
import type { FunctionDefinition, Program, Struct } from "../ir/program.ts";
import type { Statement } from "../ir/statement.ts";
import {
  type Code,
  fieldKey,
  findLive,
  isNeeded,
  isTargetLive,
  type Live,
  parameterKey,
} from "./liveness.ts";
import { mapFunction } from "./map-function.ts";

const keptArguments = (code: Code, live: Live, call: CallExpression): CallExpression => {
  const callee = code.byName.get(call.function);
  return {
    ...call,
    arguments: call.arguments.filter((_, i) => {
      const parameter = callee?.parameters[i];
      return parameter === undefined || live.marks.has(parameterKey(call.function, parameter.name));
    }),
  };
};

const prunedStatement = (
  code: Code,
  live: Live,
  owner: FunctionDefinition,
  statement: Statement,
): readonly Statement[] => {
  if (!isNeeded(code, live, owner, statement)) {
    return [];
  }
  const inside = (body: readonly Statement[]) =>
    body.flatMap((each) => prunedStatement(code, live, owner, each));
  switch (statement.kind) {
    case "assign": {
      // The value is a call with a needed effect, its result is not.
      const { value, comments, origin } = statement;
      return isTargetLive(code, live, owner, statement) || value.kind !== "call"
        ? [statement]
        : [{ kind: "call", call: value, comments, origin }];
    }
    case "if":
      return [{ ...statement, whenTrue: inside(statement.whenTrue), whenFalse: inside(statement.whenFalse) }];
    case "switch":
      return [
        {
          ...statement,
          cases: statement.cases.map((each) => ({ ...each, body: inside(each.body) })),
          otherwise: inside(statement.otherwise),
        },
      ];
    case "for":
    case "block":
      return [{ ...statement, body: inside(statement.body) }];
    default:
      return [statement];
  }
};

const prunedFunction = (code: Code, live: Live, owner: FunctionDefinition): FunctionDefinition => {
  const body = owner.body.flatMap((each) => prunedStatement(code, live, owner, each));
  const parameters = owner.parameters.filter(({ name }) => live.marks.has(parameterKey(owner.name, name)));
  return { ...owner, parameters, body };
};

const withKeptArguments = (code: Code, live: Live, owner: FunctionDefinition): FunctionDefinition =>
  mapFunction(
    owner,
    (each) => each,
    (call) => keptArguments(code, live, call),
  );

const prunedStruct = (live: Live, struct: Struct): Struct => ({
  ...struct,
  fields: struct.fields.filter(({ name }) => live.marks.has(fieldKey(struct.name, name))),
});

/** Leaves out functions nobody calls, parameters nobody reads, fields without a reader, and what only fed those. */
export const prune = (
  { functions, structs }: Pick<Program, "functions" | "structs">,
  entries: readonly string[],
): Pick<Program, "functions" | "structs"> => {
  const byName = new Map(functions.map((each) => [each.name, each]));
  const code: Code = {
    functions,
    structs,
    entries,
    byName,
    placeKeys: new WeakMap(),
    callsIn: new WeakMap(),
  };
  const live = findLive(code);
  return {
    functions: functions
      .filter(({ name }) => live.marks.has(name))
      .map((owner) => withKeptArguments(code, live, prunedFunction(code, live, owner))),
    structs: structs.map((struct) => prunedStruct(live, struct)).filter(({ fields }) => fields.length > 0),
  };
};
