import type { Argument, Place, ValueType } from "../ir/expression.ts";
import type { FunctionDefinition, ParameterType, Program } from "../ir/program.ts";
import type { Precision } from "../lowered.ts";
import { atom, type Dialect } from "../print/dialect.ts";
import type { Names } from "../print/names.ts";
import { hexFloat, isExactDecimal, shortestDecimal } from "../print/numbers.ts";
import { cReal, cSpelling } from "./spelling.ts";

/** Exact values in decimal, others in hexadecimal with the decimal beside them: C99 guarantees only the latter. */
export const cRealLiteral = (value: number, precision: Precision): string => {
  const suffix = precision === "float32" ? "f" : "";
  if (isExactDecimal(value)) {
    const text = Object.is(value, -0) ? "-0" : String(value);
    return `${text}${text.includes(".") ? "" : ".0"}${suffix}`;
  }
  return `${hexFloat(value)}${suffix} /* ${shortestDecimal(value, precision)} */`;
};

export const cType = (names: Names, type: ValueType | undefined, precision: Precision): string => {
  switch (type?.kind) {
    case undefined:
      return "void";
    case "real":
      return cReal(precision);
    case "count":
      return "int32_t";
    case "flag":
      return "bool";
    case "enum":
      return names.enumeration(type.name);
  }
};

/** Structs are passed by pointer: the first field takes an arrow. */
const placeText = (names: Names, { root, fields }: Place): string => {
  const [first, ...rest] = fields.map(names.field);
  const start = names.local(root);
  return first === undefined ? start : [`${start}->${first}`, ...rest].join(".");
};

export const countName = (names: Names, array: string): string => `${names.local(array)}_count`;

const argumentText = (names: Names, argument: Argument, parameter: ParameterType): readonly string[] => {
  if (argument.kind === "value") {
    return [];
  }
  const text = placeText(names, argument.place);
  if (argument.kind === "struct") {
    return [argument.place.fields.length === 0 ? text : `&${text}`];
  }
  if (parameter.kind !== "array" || !parameter.counted) {
    return [text];
  }
  return [text, argument.size === undefined ? countName(names, argument.place.root) : String(argument.size)];
};

export const cDialect = (program: Program, names: Names): Dialect => ({
  spell: cSpelling(program.precision),
  real: (value) => ({
    ...atom(cRealLiteral(value, program.precision)),
    atomic: !(value < 0 || Object.is(value, -0)),
  }),
  member: (type, member) => (type.kind === "enum" ? names.member(type.name, member) : member),
  constant: names.constant,
  local: names.local,
  place: (_owner: FunctionDefinition, place) => placeText(names, place),
  length: (place) => countName(names, place.root),
  argument: (_owner, argument, parameter) => argumentText(names, argument, parameter),
  function: names.function,
  declare: (type, name, mutable) =>
    `${mutable ? "" : "const "}${cType(names, type, program.precision)} ${names.local(name)}`,
  countFrom: (name, from) => `int32_t ${names.local(name)} = ${from}`,
});
