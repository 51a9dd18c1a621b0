import type { Value } from "../interpret/operations.ts";
import type { Program } from "../ir/program.ts";
import { type Layout, layoutOf, layoutStruct } from "../layout/layout.ts";
import { leavesOf } from "../layout/leaves.ts";
import { createCalibration, type StructObject } from "../layout/objects.ts";
import type { CalibrationInfo } from "../lowered.ts";
import { commentText } from "../print/comment-text.ts";
import { type Names, namesOf } from "../print/names.ts";
import { hexFloat, shortestDecimal } from "../print/numbers.ts";
import { banner } from "./text.ts";

const STEP = "    ";
const PER_LINE = 6;

const sourceText = ({ at }: CalibrationInfo): string => {
  const name = at?.file.split("/").pop();
  return at === undefined || name === undefined ? "" : `  ${name}:${at.line}`;
};

const chunks = <T>(values: readonly T[], size: number): readonly (readonly T[])[] =>
  Array.from({ length: Math.ceil(values.length / size) }, (_, i) => values.slice(i * size, (i + 1) * size));

interface Around {
  readonly program: Program;
  readonly names: Names;
  readonly layout: Layout;
  readonly indices: ReadonlyMap<string, number>;
}

const literal = ({ program, names }: Around, value: Value, enumeration: string | undefined): string => {
  if (typeof value === "string") {
    return names.member(enumeration ?? "", value);
  }
  return typeof value === "boolean"
    ? String(value)
    : `${hexFloat(value)}${program.precision === "float32" ? "f" : ""}`;
};

const printArray = (
  around: Around,
  path: string,
  printed: string,
  values: readonly number[],
  width: number,
  indent: string,
): readonly string[] => {
  const { program } = around;
  const info = program.calibrationInfo[path];
  const about = commentText(
    `[${around.indices.get(path) ?? 0}] ${info?.unit ?? ""}${info === undefined ? "" : sourceText(info)}`,
  );
  const rows = chunks(values, width).flatMap((row) => printRow(around, row, indent + STEP));
  return [`${indent}/* ${about} */`, `${indent}.${printed} = {`, ...rows, `${indent}},`];
};

/** The row in decimals above its exact values. */
const printRow = (around: Around, row: readonly number[], indent: string): readonly string[] => {
  const decimals = row.map((each) => shortestDecimal(each, around.program.precision)).join(" ");
  return [
    `${indent}/* ${decimals} */`,
    ...chunks(row, PER_LINE).map(
      (part) => `${indent}${part.map((each) => `${literal(around, each, undefined)},`).join(" ")}`,
    ),
  ];
};

const printStruct = (
  around: Around,
  structName: string,
  object: StructObject,
  path: string,
  indent: string,
): readonly string[] =>
  layoutStruct(around.layout, structName).fields.flatMap(({ name, printed, type }) => {
    const inner = path === "" ? name : `${path}.${name}`;
    const value = object[printed];
    if (type.kind === "struct") {
      return [
        `${indent}.${printed} = {`,
        ...printStruct(around, type.name, value as StructObject, inner, indent + STEP),
        `${indent}},`,
      ];
    }
    if (type.kind === "array") {
      const columns = object[printed.replace(/_values$/, "_columns")];
      const width = Array.isArray(columns) ? columns.length : PER_LINE;
      return printArray(around, inner, printed, value as number[], width, indent);
    }
    const info = around.program.calibrationInfo[inner];
    const enumeration = type.kind === "enum" ? type.name : undefined;
    const isWhole = type.kind === "count";
    const text = isWhole ? String(value) : literal(around, value as Value, enumeration);
    const decimal =
      typeof value === "number" ? shortestDecimal(value, around.program.precision) : String(value);
    const unit = info?.unit ? ` ${info.unit}` : "";
    const written =
      info?.written === undefined || info.written === `${decimal}${unit}` ? "" : `  (${info.written})`;
    const comment = commentText(
      `[${around.indices.get(inner) ?? 0}] ${decimal}${unit}${written}${info === undefined ? "" : sourceText(info)}`,
    );
    return [`${indent}.${printed} = ${text}, /* ${comment} */`];
  });

/** `<name>_cal.c`: values only. In brackets the index that the calibration check returns. */
export const printCalibration = (program: Program): string => {
  const names = namesOf(program);
  const layout = layoutOf(program);
  const { calibrationStruct } = layout;
  if (calibrationStruct === undefined) {
    return "";
  }
  const indices = new Map(
    leavesOf(layout, calibrationStruct).map((leaf) => [leaf.runtime.join("."), leaf.index]),
  );
  const object = createCalibration(layout, program.calibration, "printed");
  const lines = [
    ...banner(program, `${program.name}_cal.c`, "calibration values only; no code", [
      "In each comment: [index that the calibration check returns] value, unit, (as written), place in the spec.",
    ]),
    `#include "${program.name}.h"`,
    "",
    `const ${names.struct(calibrationStruct)} ${names.calibrationDefault} = {`,
    ...printStruct({ program, names, layout, indices }, calibrationStruct, object, "", STEP),
    "};",
  ];
  return `${lines.join("\n")}\n`;
};
