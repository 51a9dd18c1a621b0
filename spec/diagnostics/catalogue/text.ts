import type { Explanation } from "../explanation.ts";

/** The file as text and as YAML. */
export const TEXT_CODES = {
  "file-too-large": {
    severity: "error",
    cause:
      "The file is larger than 2 MB. A complete spec has some kilobytes, so this is most likely another file.",
    example: "a log or a trace given in place of the spec",
    fix: "Give the spec file. Large tables belong in at most 64 by 64 values.",
  },
  "not-utf8": {
    severity: "error",
    cause: "The file has a byte that is not UTF-8 text. Editors that save as Latin-1 or UTF-16 cause this.",
    example: "description: K\\xe4lte      # Latin-1",
    fix: "Save the file as UTF-8.",
  },
  "byte-order-mark": {
    severity: "hint",
    cause: "The file starts with a byte order mark. It is skipped here, but other tools stumble over it.",
    example: "\\ufeffspoolwright: 1",
    fix: "Save the file as UTF-8 without a byte order mark.",
  },
  "several-documents": {
    severity: "error",
    cause:
      "A line `---` starts a second YAML document. A spec is one document, so the rest would be ignored silently.",
    example: "spoolwright: 1\n---\nspoolwright: 1",
    fix: "Keep one document per file.",
  },
  "nested-too-deep": {
    severity: "error",
    cause: "Lists or maps are nested more than 60 deep. The language needs 8 levels.",
    example: "a: [[[[[[[[[[[[ ...",
    fix: "Close the brackets that are open.",
  },
  "alias-bomb": {
    severity: "error",
    cause: "Aliases that contain aliases expand to more than 20000 values.",
    example: "b: &b [*a, *a, *a]\nc: &c [*b, *b, *b]",
    fix: "Write the values out, or use fewer aliases.",
  },
  "unknown-alias": {
    severity: "error",
    cause: "An alias `*name` has no anchor `&name` before it, or stands inside its own anchor.",
    example: "fall: *rise",
    fix: "Put `&rise` before the value that is meant, or write the value again.",
  },
  "empty-file": {
    severity: "error",
    cause: "The file has no map of keys at its top.",
    example: "# only a comment",
    fix: "Start with `spoolwright: 1` and the section `controller:` (or `plant:` in a plant file).",
  },
  "bad-yaml": {
    severity: "error",
    cause:
      "The text is not YAML 1.2: a bracket or quote is open, an indentation does not fit, or a sign is reserved.",
    example: "slew: { rise: 900 kPa/s",
    fix: "Close the bracket or quote, line the keys up, or put the value in double quotes.",
  },
  "tab-indentation": {
    severity: "error",
    cause: "A tab indents a line. YAML allows only spaces, because editors disagree on the width of a tab.",
    example: "controller:\n\tstep: 5 ms",
    fix: "Replace each tab by two spaces.",
  },
  "unquoted-percent": {
    severity: "error",
    cause:
      "A value starts with `%`. YAML keeps that sign for directives, so it must be quoted when it stands alone.",
    example: "unit: %",
    fix: 'Write `unit: "%"`. After a number, as in `20 %`, no quotes are needed.',
  },
  "duplicate-key": {
    severity: "error",
    cause: "A map has the same key twice. One of the two values would be lost silently.",
    example: "step: 5 ms\nstep: 10 ms",
    fix: "Keep one of the two lines.",
  },
  "key-not-text": {
    severity: "error",
    cause: "A key is a list or a map. Every key of a spec is a plain word.",
    example: "[step]: 5 ms",
    fix: "Write the key as a word: `step: 5 ms`.",
  },
  "number-as-text": {
    severity: "error",
    cause: "A plain number is in quotes, which makes it text.",
    example: 'pressure_ratio_ceiling: "2.7"',
    fix: "Remove the quotes.",
  },
  "exponent-without-point": {
    severity: "hint",
    cause: "A plain number such as `1e3` is a number in YAML 1.2, but text to programs that read YAML 1.1.",
    example: "sensor_noise: 1e1",
    fix: "Write the digits, or a point and a sign: `1.0e+1`.",
  },
  "boolean-word": {
    severity: "error",
    cause:
      "A word such as `yes`, `no`, `on` or `off` stands where the key takes something else. YAML 1.1 programs read these words as true or false.",
    example: "anti_windup: off",
    fix: "Write what the key takes, for example `anti_windup: { method: none }` or `true`.",
  },
} as const satisfies Record<string, Explanation>;
