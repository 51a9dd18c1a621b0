import type { Value } from "../interpret/operations.ts";
import type { ValueType } from "../ir/expression.ts";
import type { FunctionDefinition, Parameter, Program, Struct } from "../ir/program.ts";
import { type Layout, layoutOf } from "../layout/layout.ts";
import { createCalibration, createStruct, type StructObject } from "../layout/objects.ts";
import type { Precision } from "../lowered.ts";
import { blockComment, commentText } from "../print/comment-text.ts";
import { helpersFor, usedOperators } from "../print/helpers.ts";
import { snakeCase } from "../print/identifiers.ts";
import { type Names, namesOf } from "../print/names.ts";
import { shortestDecimal } from "../print/numbers.ts";
import { printFunctionBody } from "../print/print-statement.ts";
import { wrap } from "../print/wrap.ts";
import { typescriptDialect, typescriptReal } from "./dialect.ts";
import { TYPESCRIPT_HELPERS } from "./spelling.ts";

const STEP = "    ";

const valueType = (names: Names, type: ValueType | undefined): string => {
  if (type === undefined) {
    return "void";
  }
  return type.kind === "enum" ? names.enumeration(type.name) : type.kind === "flag" ? "boolean" : "number";
};

const head = (program: Program): readonly string[] => [
  `/* ${program.name}.ts - ${commentText(program.description)}`,
  ` * The twin of ${program.name}.c: same names, same order, same bits at ${program.precision}.`,
  ` * Generated from ${commentText(program.source)}, meaning ${program.meaning}. Edit that file instead of this one.`,
  " * Values put into inputs and calibrations must be rounded to the precision already (Math.fround at float32).",
  " * Contents: 1 types  2 helpers and constants  3 blocks in run order  4 init and steps  5 calibration and data */",
];

const section = (title: string): readonly string[] => [
  "",
  `/* ---- ${title} ${"-".repeat(Math.max(3, 92 - title.length))} */`,
];

const printStruct = (names: Names, struct: Struct): readonly string[] => [
  "",
  ...blockComment(struct.doc, ""),
  `export interface ${names.struct(struct.name)} {`,
  ...struct.fields.flatMap(({ name, type, doc }) => {
    const text =
      type.kind === "struct"
        ? names.struct(type.name)
        : type.kind === "array"
          ? "number[]"
          : valueType(names, type);
    return [...blockComment(doc, STEP), `${STEP}${names.field(name)}: ${text};`];
  }),
  "}",
];

const parameterText = (names: Names, { name, type }: Parameter): string => {
  const text =
    type.kind === "struct"
      ? names.struct(type.name)
      : type.kind === "array"
        ? "readonly number[]"
        : valueType(names, type);
  return `${names.local(name)}: ${text}`;
};

const printFunction = (
  program: Program,
  names: Names,
  definition: FunctionDefinition,
  isEntry: boolean,
): readonly string[] => {
  const around = {
    dialect: typescriptDialect(program, names),
    owner: definition,
    functions: new Map(program.functions.map((each) => [each.name, each])),
  };
  const parameters = definition.parameters.map((each) => parameterText(names, each)).join(", ");
  const signature = `${isEntry ? "export " : ""}function ${names.function(definition.name)}(${parameters})`;
  return [
    "",
    ...blockComment(definition.doc, ""),
    ...wrap(`${signature}: ${valueType(names, definition.returns)} {`),
    ...printFunctionBody(around, definition),
    "}",
  ];
};

const valueText = (value: Value | number[] | StructObject, precision: Precision): string => {
  if (Array.isArray(value)) {
    return `[${value.map((each) => String(each)).join(", ")}]`;
  }
  if (typeof value === "object") {
    const fields = Object.entries(value).map(([name, each]) => `${name}: ${valueText(each, precision)}`);
    return `{ ${fields.join(", ")} }`;
  }
  return typeof value === "number" && !Number.isInteger(value)
    ? typescriptReal(value, precision)
    : JSON.stringify(value);
};

const printCreator = (
  layout: Layout,
  names: Names,
  struct: string,
  object: StructObject,
): readonly string[] => [
  "",
  `export function create_${snakeCase(struct)}(): ${names.struct(struct)} {`,
  `${STEP}return {`,
  ...Object.entries(object).flatMap(([name, value]) =>
    wrap(`${STEP}${STEP}${name}: ${valueText(value, layout.precision)},`),
  ),
  `${STEP}};`,
  "}",
];

const printData = (program: Program, names: Names): readonly string[] => {
  const layout = layoutOf(program);
  return layout.structs
    .filter(({ outer }) => outer)
    .flatMap(({ name }) => {
      const object =
        name === layout.calibrationStruct
          ? createCalibration(layout, program.calibration, "printed")
          : createStruct(layout, name, "printed");
      return printCreator(layout, names, name, object);
    });
};

const printConstants = (program: Program, names: Names): readonly string[] =>
  program.constants.map(({ name, value, unit, doc, type }) => {
    const short = type.kind === "real" ? shortestDecimal(value, program.precision) : String(value);
    const comment = commentText([`${short}${unit === undefined ? "" : ` ${unit}`}`, ...doc].join("; "));
    return `const ${names.constant(name)} = ${String(value)}; /* ${comment} */`;
  });

/** One module, the readable twin of the C. Pure text; `precision` must be the program's own. */
export const printTypeScript = (program: Program): string => {
  const names = namesOf(program);
  const isEntry = (name: string) => program.entries.some((entry) => entry.function === name);
  const blocks = program.functions.filter(({ name }) => !isEntry(name));
  const entries = program.entries.flatMap((entry) =>
    program.functions.filter(({ name }) => name === entry.function),
  );
  const print = (definition: FunctionDefinition, exported: boolean) =>
    printFunction(program, names, definition, exported);
  const lines = [
    ...head(program),
    ...section("1 types"),
    ...program.enumerations.map(
      ({ name, members }) =>
        `export type ${names.enumeration(name)} = ${members.map((each) => JSON.stringify(each)).join(" | ")};`,
    ),
    ...program.structs.flatMap((struct) => printStruct(names, struct)),
    ...section("2 helpers and constants: comparisons, not Math.min or Math.max, so NaN and -0 act as in C"),
    ...(program.precision === "float32" ? ["const f = Math.fround;"] : []),
    ...helpersFor(usedOperators(program), TYPESCRIPT_HELPERS).flat(),
    ...printConstants(program, names),
    ...section("3 blocks"),
    ...blocks.flatMap((each) => print(each, false)),
    ...section("4 init and steps"),
    ...entries.flatMap((each) => print(each, true)),
    ...section("5 calibration and data"),
    ...printData(program, names),
  ];
  return `${lines.join("\n")}\n`;
};
