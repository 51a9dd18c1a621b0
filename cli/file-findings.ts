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
  "csv-format": {
    severity: "error",
    cause:
      "The file is not comma-separated text with a header line and the same number of fields in every line.",
    example: "time_s,engine_speed_rpm\n0,3000,1",
    fix: "Write one header line, then one line per row with a field for each column.",
  },
  "csv-missing-column": {
    severity: "error",
    cause: "A column that the open-loop run needs is not in the header. The names carry the unit.",
    example: "time_s,engine_speed",
    fix: "Name the column as the message says, for example `engine_speed_rpm`, and give it in that unit.",
  },
  "csv-value": {
    severity: "error",
    cause: "A field is not a number, or not one that this column can have; often it is in another unit.",
    example: "ambient_pressure_kpa\n101325",
    fix: "Convert the column to the unit in its name: `101.325`.",
  },
  "csv-time-order": {
    severity: "error",
    cause: "The time of a row does not come after the time of the row before it.",
    example: "time_s\n0\n0.5\n0.4",
    fix: "Sort the rows by time and remove doubles.",
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
