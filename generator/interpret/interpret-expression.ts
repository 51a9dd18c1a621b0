import type { Argument, CallExpression, Expression, Place } from "../ir/expression.ts";
import type { StructObject } from "../layout/objects.ts";
import { evaluate, type operations, type Value } from "./operations.ts";

/** Values of a function's parameters and locals while it runs, by slot. */
export type Frame = (Value | number[] | StructObject)[];
export type Evaluate = (frame: Frame) => Value;
export type Reach = (frame: Frame) => StructObject | number[];
export type Call = (values: Frame) => Value;

/** What a function's code refers to while it is made into closures. */
export interface Surroundings {
  readonly slots: ReadonlyMap<string, number>;
  readonly table: ReturnType<typeof operations>;
  readonly call: (name: string) => Call;
  readonly frameSize: (name: string) => number;
}

export const slotOf = (around: Surroundings, name: string): number => {
  const slot = around.slots.get(name);
  if (slot === undefined) {
    throw new Error(`internal: no slot for ${name}`);
  }
  return slot;
};

/** Object names down to a place: a table's part is an object inside. */
const pathOf = (place: Place): readonly string[] => place.fields.flatMap((field) => field.split("."));

/** Follows names from the object in a slot; short paths, which are nearly all, without a loop. */
const follow = (slot: number, path: readonly string[]): Reach => {
  const [first, second] = path;
  switch (path.length) {
    case 0:
      return (frame) => frame[slot] as StructObject;
    case 1:
      return (frame) => (frame[slot] as StructObject)[first] as StructObject;
    case 2:
      return (frame) => ((frame[slot] as StructObject)[first] as StructObject)[second] as StructObject;
    default:
      return (frame) =>
        path.reduce((object, name) => object[name] as StructObject, frame[slot] as StructObject);
  }
};

export const reach = (around: Surroundings, place: Place): Reach =>
  follow(slotOf(around, place.root), pathOf(place));

/** The object that holds the place's last name, and that name. */
export const reachHolder = (around: Surroundings, place: Place): { holder: Reach; name: string } => {
  const path = pathOf(place);
  return { holder: follow(slotOf(around, place.root), path.slice(0, -1)), name: path[path.length - 1] };
};

const argumentOf = (around: Surroundings, argument: Argument): ((frame: Frame) => Frame[number]) =>
  argument.kind === "value" ? interpretExpression(around, argument.value) : reach(around, argument.place);

export const interpretCall = (around: Surroundings, call: CallExpression): Evaluate => {
  const given = call.arguments.map((argument) => argumentOf(around, argument));
  const size = around.frameSize(call.function);
  let callee: Call | undefined;
  return (frame) => {
    callee ??= around.call(call.function);
    const inner: Frame = new Array(size);
    for (let i = 0; i < given.length; i++) {
      inner[i] = given[i](frame);
    }
    return callee(inner);
  };
};

/** Operands of these are evaluated only as far as needed, so that an index is never used past its guard. */
const interpretOperation = (
  around: Surroundings,
  expression: Expression & { kind: "operation" },
): Evaluate => {
  const [a, b, c] = expression.operands.map((each) => interpretExpression(around, each));
  const operate = around.table[expression.operator] as (...operands: readonly Value[]) => Value;
  switch (expression.operator) {
    case "and":
      return (frame) => a(frame) && b(frame);
    case "or":
      return (frame) => a(frame) || b(frame);
    case "selectReal":
    case "selectCount":
    case "selectFlag":
    case "selectEnum":
      return (frame) => (a(frame) ? b(frame) : c(frame));
    default:
  }
  switch (expression.operands.length) {
    case 1:
      return (frame) => operate(a(frame));
    case 2:
      return (frame) => operate(a(frame), b(frame));
    default:
      return (frame) => evaluate(operate, [a(frame), b(frame), c(frame)]);
  }
};

export const interpretExpression = (around: Surroundings, expression: Expression): Evaluate => {
  switch (expression.kind) {
    case "local": {
      const slot = slotOf(around, expression.name);
      return (frame) => frame[slot] as Value;
    }
    case "field": {
      const { holder, name } = reachHolder(around, expression.place);
      return (frame) => (holder(frame) as StructObject)[name] as Value;
    }
    case "element": {
      const array = reach(around, expression.place);
      const index = interpretExpression(around, expression.index);
      return (frame) => (array(frame) as number[])[index(frame) as number];
    }
    case "length": {
      const array = reach(around, expression.place);
      return (frame) => (array(frame) as number[]).length;
    }
    case "operation":
      return interpretOperation(around, expression);
    case "call":
      return interpretCall(around, expression);
    case "structure":
      throw new Error(`internal: the structure's ${expression.field} was not fixed`);
    default: {
      const { value } = expression;
      return () => value;
    }
  }
};
