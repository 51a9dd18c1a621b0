import type { Place } from "../ir/expression.ts";
import type { Program } from "../ir/program.ts";
import { atom, type Dialect } from "../print/dialect.ts";
import type { Names } from "../print/names.ts";
import { isExactDecimal, shortestDecimal } from "../print/numbers.ts";
import { typescriptSpelling } from "./spelling.ts";

const placeText = (names: Names, { root, fields }: Place): string =>
  [names.local(root), ...fields.map(names.field)].join(".");

/** A float prints as the double it is, so that reading it needs no rounding; the short form stands beside it. */
export const typescriptReal = (value: number, precision: Program["precision"]): string => {
  const text = Object.is(value, -0) ? "-0" : String(value);
  const short = shortestDecimal(value, precision);
  return precision === "float64" || isExactDecimal(value) || short === text ? text : `${text} /* ${short} */`;
};

export const typescriptDialect = (program: Program, names: Names): Dialect => ({
  spell: typescriptSpelling(program.precision),
  real: (value) => ({
    ...atom(typescriptReal(value, program.precision)),
    atomic: !(value < 0 || Object.is(value, -0)),
  }),
  member: (_type, member) => JSON.stringify(member),
  constant: names.constant,
  local: names.local,
  place: (_owner, place) => placeText(names, place),
  length: (place) => `${placeText(names, place)}.length`,
  argument: (_owner, argument) => (argument.kind === "value" ? [] : [placeText(names, argument.place)]),
  function: names.function,
  declare: (type, name, mutable) => {
    const annotation =
      type.kind === "enum"
        ? `: ${names.enumeration(type.name)}`
        : type.kind === "flag"
          ? ": boolean"
          : ": number";
    return `${mutable ? "let" : "const"} ${names.local(name)}${mutable ? annotation : ""}`;
  },
  countFrom: (name, from) => `let ${names.local(name)} = ${from}`,
});
