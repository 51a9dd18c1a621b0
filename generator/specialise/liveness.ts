import type { CallExpression, Expression, Place } from "../ir/expression.ts";
import { type FunctionDefinition, findStruct, type Program, type Struct } from "../ir/program.ts";
import type { Statement } from "../ir/statement.ts";
import { argumentValues, bodiesOf, eachCallOf, eachExpression, eachStatement } from "../ir/walk.ts";

/** The part of a program that liveness looks at. */
export interface Code extends Pick<Program, "functions" | "structs"> {
  readonly entries: readonly string[];
  readonly byName: ReadonlyMap<string, FunctionDefinition>;
  readonly placeKeys: WeakMap<Place, readonly string[]>;
  readonly callsIn: WeakMap<Expression, readonly CallExpression[]>;
}

/** What something depends on, by key: `Struct.field`, `function(parameter`, `function:local`. Grows until nothing changes. */
export interface Live {
  readonly marks: ReadonlySet<string>;
}

export const fieldKey = (struct: string, field: string): string => `${struct}.${field}`;
export const parameterKey = (owner: string, parameter: string): string => `${owner}(${parameter}`;
const localKey = (owner: string, local: string): string => `${owner}:${local}`;

/** Struct of each field along a place, and the field. */
export const stepsOf = (
  code: Pick<Code, "structs">,
  owner: FunctionDefinition,
  place: Place,
): { readonly struct: string; readonly field: string }[] => {
  const parameter = owner.parameters.find(({ name }) => name === place.root);
  let struct: Struct | undefined =
    parameter?.type.kind === "struct" ? findStruct(code, parameter.type.name) : undefined;
  return place.fields.map((field) => {
    const step = { struct: struct?.name ?? "", field };
    const type = struct?.fields.find(({ name }) => name === field)?.type;
    struct = type?.kind === "struct" ? findStruct(code, type.name) : undefined;
    return step;
  });
};

/** Keys of the fields along a place; places are asked for many times, hence the memory. */
const keysOf = (code: Code, owner: FunctionDefinition, place: Place): readonly string[] => {
  const known = code.placeKeys.get(place);
  if (known !== undefined) {
    return known;
  }
  const keys = stepsOf(code, owner, place).map(({ struct, field }) => fieldKey(struct, field));
  code.placeKeys.set(place, keys);
  return keys;
};

const isLivePlace = (code: Code, live: Live, owner: FunctionDefinition, place: Place): boolean =>
  keysOf(code, owner, place).every((key) => live.marks.has(key));

/** A call matters when something it writes matters: a written parameter whose object is live where it comes from. */
const isCallNeeded = (code: Code, live: Live, owner: FunctionDefinition, call: CallExpression): boolean => {
  const callee = code.byName.get(call.function);
  return (callee?.parameters ?? []).some((parameter, i) => {
    const argument = call.arguments[i];
    return (
      argument.kind === "struct" &&
      live.marks.has(writeKey(call.function, parameter.name)) &&
      isLivePlace(code, live, owner, argument.place)
    );
  });
};

/** The function writes something live through this parameter. */
const writeKey = (owner: string, parameter: string): string => `${owner}!${parameter}`;

const callsIn = (code: Code, expression: Expression): readonly CallExpression[] => {
  const known = code.callsIn.get(expression);
  if (known !== undefined) {
    return known;
  }
  const calls: CallExpression[] = [];
  eachExpression(expression, (each) => {
    if (each.kind === "call") {
      calls.push(each);
    }
  });
  code.callsIn.set(expression, calls);
  return calls;
};

const containsNeededCall = (
  code: Code,
  live: Live,
  owner: FunctionDefinition,
  expression: Expression,
): boolean => callsIn(code, expression).some((call) => isCallNeeded(code, live, owner, call));

/** Whether a statement has an effect that anything live depends on. */
export const isNeeded = (
  code: Code,
  live: Live,
  owner: FunctionDefinition,
  statement: Statement,
): boolean => {
  switch (statement.kind) {
    case "local":
      return (
        live.marks.has(localKey(owner.name, statement.name)) ||
        containsNeededCall(code, live, owner, statement.value)
      );
    case "assign":
      return (
        isTargetLive(code, live, owner, statement) || containsNeededCall(code, live, owner, statement.value)
      );
    case "call":
      return isCallNeeded(code, live, owner, statement.call);
    default:
      return bodiesOf(statement).some((body) => body.some((each) => isNeeded(code, live, owner, each)));
  }
};

export const isTargetLive = (
  code: Code,
  live: Live,
  owner: FunctionDefinition,
  { target }: Statement & { kind: "assign" },
): boolean =>
  target.kind === "local"
    ? live.marks.has(localKey(owner.name, target.name))
    : isLivePlace(code, live, owner, target.place);

interface Marker {
  readonly code: Code;
  readonly marks: Set<string>;
}

const markPlace = ({ code, marks }: Marker, owner: FunctionDefinition, place: Place): void => {
  marks.add(parameterKey(owner.name, place.root));
  for (const key of keysOf(code, owner, place)) {
    marks.add(key);
  }
};

const markRead = (marker: Marker, owner: FunctionDefinition, expression: Expression): void => {
  eachExpression(expression, (each) => {
    switch (each.kind) {
      case "local":
        marker.marks.add(localKey(owner.name, each.name));
        marker.marks.add(parameterKey(owner.name, each.name));
        break;
      case "field":
      case "element":
      case "length":
        markPlace(marker, owner, each.place);
        break;
      case "call":
        markCall(marker, owner, each);
        break;
      default:
    }
  });
};

/** Arguments that the callee still uses; values among the others are not read at all. */
const markCall = (marker: Marker, owner: FunctionDefinition, call: CallExpression): void => {
  const callee = marker.code.byName.get(call.function);
  marker.marks.add(call.function);
  callee?.parameters.forEach((parameter, i) => {
    const argument = call.arguments[i];
    if (argument.kind === "value") {
      return;
    }
    if (marker.marks.has(parameterKey(call.function, parameter.name))) {
      markPlace(marker, owner, argument.place);
    }
  });
};

const markStatement = (marker: Marker, owner: FunctionDefinition, statement: Statement): void => {
  const { code, marks } = marker;
  switch (statement.kind) {
    case "local":
      markRead(marker, owner, statement.value);
      break;
    case "assign": {
      const { target } = statement;
      if (target.kind !== "local" && isTargetLive(code, marker, owner, statement)) {
        marks.add(parameterKey(owner.name, target.place.root));
      }
      if (target.kind === "element") {
        markRead(marker, owner, target.index);
      }
      markRead(marker, owner, statement.value);
      break;
    }
    case "if":
      markRead(marker, owner, statement.condition);
      break;
    case "switch":
      markRead(marker, owner, statement.subject);
      break;
    case "for":
      markRead(marker, owner, statement.from);
      markRead(marker, owner, statement.below);
      break;
    case "call":
      for (const value of argumentValues(statement.call)) {
        markRead(marker, owner, value);
      }
      markCall(marker, owner, statement.call);
      break;
    case "block":
      break;
  }
};

const markBody = (marker: Marker, owner: FunctionDefinition, body: readonly Statement[]): void => {
  for (const statement of body) {
    if (isNeeded(marker.code, marker, owner, statement)) {
      markStatement(marker, owner, statement);
      for (const inside of bodiesOf(statement)) {
        markBody(marker, owner, inside);
      }
    }
  }
};

/** Everything written into an output is wanted by the caller. */
const markOutputs = (marker: Marker): void => {
  const isOutput = (name: string) => findStruct(marker.code, name).role === "output";
  for (const owner of marker.code.functions) {
    eachStatement(owner.body, (statement) => {
      if (statement.kind === "assign" && statement.target.kind !== "local") {
        const steps = stepsOf(marker.code, owner, statement.target.place);
        if (steps.length > 0 && isOutput(steps[0].struct)) {
          markPlace(marker, owner, statement.target.place);
        }
      }
    });
  }
};

/** What a function writes: fields of its parameters, and objects of its parameters that it passes on. */
interface Writes {
  readonly owner: FunctionDefinition;
  readonly places: readonly Place[];
  readonly passed: readonly { readonly place: Place; readonly key: string }[];
}

const passedOn = (code: Code, call: CallExpression): Writes["passed"] =>
  (code.byName.get(call.function)?.parameters ?? []).flatMap((parameter, i) => {
    const argument = call.arguments[i];
    const key = writeKey(call.function, parameter.name);
    return argument.kind === "struct" ? [{ place: argument.place, key }] : [];
  });

const writesOf = (code: Code, owner: FunctionDefinition): Writes => {
  const places: Place[] = [];
  eachStatement(owner.body, (statement) => {
    if (statement.kind === "assign" && statement.target.kind !== "local") {
      places.push(statement.target.place);
    }
  });
  const passed: Writes["passed"][number][] = [];
  eachCallOf(owner, (call) => passed.push(...passedOn(code, call)));
  return { owner, places, passed };
};

/** A function's live writes, whether it is needed or not: they decide which calls are needed. */
const markWrites = (marker: Marker, { owner, places, passed }: Writes): void => {
  const written = [...places, ...passed.filter(({ key }) => marker.marks.has(key)).map(({ place }) => place)];
  for (const place of written) {
    if (isLivePlace(marker.code, marker, owner, place)) {
      marker.marks.add(writeKey(owner.name, place.root));
    }
  }
};

/** Marks what the results of the entries depend on, until a round adds nothing. */
export const findLive = (code: Code): Live => {
  const marker: Marker = { code, marks: new Set(code.entries) };
  const writes = code.functions.map((owner) => writesOf(code, owner));
  markOutputs(marker);
  for (let before = -1; before !== marker.marks.size; ) {
    before = marker.marks.size;
    for (const each of writes) {
      markWrites(marker, each);
    }
    for (const owner of code.functions) {
      if (marker.marks.has(owner.name)) {
        markBody(marker, owner, owner.body);
        if (owner.result !== undefined) {
          markRead(marker, owner, owner.result);
        }
      }
    }
  }
  return marker;
};
