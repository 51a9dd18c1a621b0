import type { FunctionDefinition, Parameter, Program } from "../ir/program.ts";
import { blockComment } from "../print/comment-text.ts";
import type { Names } from "../print/names.ts";
import { printFunctionBody } from "../print/print-statement.ts";
import { wrap } from "../print/wrap.ts";
import type { Effects } from "../validate/effects.ts";
import { cDialect, countName, cType } from "./dialect.ts";
import { cReal } from "./spelling.ts";

const parameterText = (
  program: Program,
  names: Names,
  { name, type }: Parameter,
  written: boolean,
): readonly string[] => {
  const printed = names.local(name);
  switch (type.kind) {
    case "struct":
      return [`${written ? "" : "const "}${names.struct(type.name)} *${printed}`];
    case "array":
      return [
        `const ${cReal(program.precision)} ${printed}[]`,
        ...(type.counted ? [`int32_t ${countName(names, name)}`] : []),
      ];
    default:
      return [`${cType(names, type, program.precision)} ${printed}`];
  }
};

/** Return type, name and parameters; what a function does not write into is const. */
export const signature = (
  program: Program,
  names: Names,
  definition: FunctionDefinition,
  effects: Effects,
): string => {
  const written = effects.get(definition.name);
  const parameters = definition.parameters.flatMap((each) =>
    parameterText(program, names, each, written?.has(each.name) ?? false),
  );
  const result = cType(names, definition.returns, program.precision);
  return `${result} ${names.function(definition.name)}(${parameters.length === 0 ? "void" : parameters.join(", ")})`;
};

export const printFunction = (
  program: Program,
  names: Names,
  definition: FunctionDefinition,
  effects: Effects,
): readonly string[] => {
  const isEntry = program.entries.some((entry) => entry.function === definition.name);
  const around = {
    dialect: cDialect(program, names),
    owner: definition,
    functions: new Map(program.functions.map((each) => [each.name, each])),
  };
  return [
    "",
    ...blockComment(definition.doc, ""),
    ...wrap(`${isEntry ? "" : "static "}${signature(program, names, definition, effects)}`),
    "{",
    ...printFunctionBody(around, definition),
    "}",
  ];
};
