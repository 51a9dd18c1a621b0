import type { Program } from "../ir/program.ts";
import { printCalibration } from "./calibration.ts";
import { printCode } from "./code.ts";
import { printHeader } from "./header.ts";
import { printMakefile } from "./makefile.ts";

/** The C files by name: contract, values, code, and how to build them. Pure text. */
export const printC = (program: Program): ReadonlyMap<string, string> =>
  new Map(
    [
      [`${program.name}.h`, printHeader(program)],
      [`${program.name}.c`, printCode(program)],
      [`${program.name}_cal.c`, printCalibration(program)],
      ["Makefile", printMakefile(program)],
    ].filter(([, text]) => text !== "") as [string, string][],
  );
