import type { Enumeration, Field, Program, Struct } from "../ir/program.ts";
import { findFunction } from "../ir/program.ts";
import { layoutOf, layoutStruct } from "../layout/layout.ts";
import type { StructRole } from "../lowered.ts";
import { blockComment, commentText } from "../print/comment-text.ts";
import { upperCase } from "../print/identifiers.ts";
import { type Names, namesOf } from "../print/names.ts";
import { wrap } from "../print/wrap.ts";
import { effectsOf } from "../validate/effects.ts";
import { cType } from "./dialect.ts";
import { signature } from "./function.ts";
import { printPeriods, whenSentences } from "./periods.ts";
import { cReal } from "./spelling.ts";
import { banner, section } from "./text.ts";

const STEP = "    ";

const ROLE: Readonly<Record<StructRole, string>> = {
  calibration: "Calibration: constant while a step runs; check it before the first step.",
  state: "State: the caller's memory, set by init, touched by the steps only.",
  exchange:
    "Exchange between the tasks, on one core: every field has one writer and fits one access, and a step reads or writes it once. No lock is needed.",
  input: "Input: sampled by the caller before the step; any bit pattern is allowed.",
  output: "Output: set by the step.",
};

const printEnumeration = (names: Names, { name, members, doc }: Enumeration): readonly string[] => [
  "",
  ...blockComment(doc, ""),
  "typedef enum {",
  ...members.map(
    (each, i) => `${STEP}${names.member(name, each)} = ${i}${i < members.length - 1 ? "," : ""}`,
  ),
  `} ${names.enumeration(name)};`,
];

const printField = (
  program: Program,
  names: Names,
  struct: Struct,
  { name, type, doc }: Field,
): readonly string[] => {
  const printed = names.field(name);
  const qualifier = struct.role === "exchange" && type.kind !== "struct" ? "volatile " : "";
  const text =
    type.kind === "struct"
      ? `${names.struct(type.name)} ${printed}`
      : type.kind === "array"
        ? `${cReal(program.precision)} ${printed}[${type.size}]`
        : `${cType(names, type, program.precision)} ${printed}`;
  const about = struct.name === program.calibrationStruct ? unitAndRange(program, name) : "";
  return [...blockComment(doc, STEP), `${STEP}${qualifier}${text};${about}`];
};

/** Wider limits than this say no more than "finite". */
const TELLING_LIMIT = 1e8;

/** What the check allows, beside a calibration value: `kPa abs, 1 to 2000`. */
const unitAndRange = (program: Program, path: string): string => {
  const { unit = "", low, high } = program.calibrationInfo[path] ?? {};
  const isTold =
    low !== undefined && high !== undefined && Math.abs(low) < TELLING_LIMIT && high < TELLING_LIMIT;
  const parts = [unit, ...(isTold ? [`${low} to ${high}`] : [])].filter((part) => part !== "");
  return parts.length === 0 ? "" : ` /* ${commentText(parts.join(", "))} */`;
};

const printStruct = (program: Program, names: Names, struct: Struct): readonly string[] => [
  "",
  ...blockComment(struct.doc, ""),
  "typedef struct {",
  ...struct.fields.flatMap((field) => printField(program, names, struct, field)),
  `} ${names.struct(struct.name)};`,
];

/** The role's sentence stands above the struct's own, once per struct that the caller owns. */
const withRole = (program: Program, struct: Struct): Struct =>
  layoutStruct(layoutOf(program), struct.name).outer
    ? { ...struct, doc: [ROLE[struct.role], ...struct.doc] }
    : struct;

const LANGUAGE_OPEN = ["", "#ifdef __cplusplus", 'extern "C" {', "#endif"];
const LANGUAGE_CLOSE = ["", "#ifdef __cplusplus", "}", "#endif"];

const printPrototypes = (program: Program, names: Names): readonly string[] => {
  const effects = effectsOf(program.functions);
  return program.entries.flatMap((entry) => [
    "",
    ...blockComment([whenSentences(entry)], ""),
    ...wrap(`${signature(program, names, findFunction(program, entry.function), effects)};`),
  ]);
};

const cautionLines = (program: Program): readonly string[] =>
  program.cautions.length === 0 ? [] : ["", ...blockComment(["CAUTION:", ...program.cautions], "")];

/** `<name>.h`: the contract. */
export const printHeader = (program: Program): string => {
  const names = namesOf(program);
  const guard = `${upperCase(program.name)}_H`;
  const calibration =
    program.calibrationStruct === undefined
      ? []
      : [
          "",
          "/* The calibration as specified. */",
          `extern const ${names.struct(program.calibrationStruct)} ${names.calibrationDefault};`,
        ];
  const contents = "Contents: 1 types  2 calibration  3 functions";
  const lines = [
    ...banner(program, `${program.name}.h`, "the contract of the controller", [contents]),
    ...cautionLines(program),
    `#ifndef ${guard}`,
    `#define ${guard}`,
    "",
    "#include <stdbool.h>",
    "#include <stdint.h>",
    ...LANGUAGE_OPEN,
    ...section("1 types", [
      ...program.enumerations.flatMap((each) => printEnumeration(names, each)),
      ...program.structs.flatMap((each) => printStruct(program, names, withRole(program, each))),
    ]),
    ...section("2 calibration", calibration),
    ...section("3 functions", [...printPeriods(program, names), ...printPrototypes(program, names)]),
    ...LANGUAGE_CLOSE,
    "",
    `#endif /* ${guard} */`,
  ];
  return `${lines.join("\n")}\n`;
};
