import type { InputProblem } from "../hil-sim/index.ts";
import type { Diagnostic, Explanation } from "../spec/index.ts";
import type { ReadProblem } from "./files/read-limited.ts";

/** What can be wrong with a file before spec reads its text, which has no disk, and with files that only the command line reads. */
export const FILE_CODES: Readonly<Record<string, Explanation>> = {
  "file-missing": {
    severity: "error",
    cause: "There is no file of this name.",
    example: "spoolwright check lop.yaml",
    fix: "Check the path; it is relative to the current folder.",
  },
  "file-is-folder": {
    severity: "error",
    cause: "The path names a folder, not a file.",
    example: "spoolwright check examples/",
    fix: "Name the spec file in the folder.",
  },
  "file-unreadable": {
    severity: "error",
    cause: "The file cannot be opened, or it is a pipe or a device instead of a file.",
    example: "spoolwright check /dev/zero",
    fix: "Check the permissions, or save the text to a file first.",
  },
  "bad-inputs": {
    severity: "error",
    cause:
      "A row of the inputs file cannot be used: a column is missing, a field is not a number or not in the unit that " +
      "the column's name says, or time does not go forward.",
    example: "ambient_pressure_kpa\n101325",
    fix: "Correct the field that the message names: `101.325`.",
  },
};

const SAYS: Readonly<
  Record<ReadProblem, { readonly code: string; readonly message: string; readonly fix: string }>
> = {
  missing: { code: "file-missing", message: "there is no such file", fix: "check the path" },
  directory: { code: "file-is-folder", message: "this is a folder, not a file", fix: "name the file in it" },
  not_a_file: {
    code: "file-unreadable",
    message: "this is a device or a pipe, not a file",
    fix: "save the text to a file first",
  },
  unreadable: { code: "file-unreadable", message: "the file cannot be read", fix: "check the permissions" },
  too_large: {
    code: "file-too-large",
    message: "the file is larger than the limit",
    fix: "check that this is the file you meant",
  },
};

/** A finding about a whole file, placed at its first character. */
export function fileFinding(file: string, problem: ReadProblem): Diagnostic {
  const at = { file, line: 1, column: 1, endLine: 1, endColumn: 2 };
  return { ...SAYS[problem], severity: "error", at };
}

/** A problem of an open-loop inputs file as a finding. */
export function inputsFinding(file: string, { line, column, message, label }: InputProblem): Diagnostic {
  const at = { file, line, column, endLine: line, endColumn: column + 1 };
  return { code: "bad-inputs", severity: "error", at, message, label };
}
