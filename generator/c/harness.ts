import { type FrameLayout, frameLayout, RUN_FAST, RUN_SLOW, type Word } from "../agreement/frames.ts";
import { entryNames } from "../agreement/run-module.ts";
import type { Program } from "../ir/program.ts";
import { type Layout, layoutOf } from "../layout/layout.ts";
import { snakeCase } from "../print/identifiers.ts";
import { namesOf } from "../print/names.ts";

// A program around the generated C that reads frames and records what every step does. Test equipment, no control code.

const variable = (struct: string): string => `the_${snakeCase(struct)}`;

const access = ({ struct, path, element }: Word): string =>
  `${variable(struct)}.${path.printed.join(".")}${element === undefined ? "" : `[${element}]`}`;

const getLine = (layout: Layout, word: Word): string => {
  const { type } = word;
  if (type.kind === "real") {
    return `    ${access(word)} = get_real();`;
  }
  const enumeration = type.kind === "enum" ? `(${layout.stem}_${snakeCase(type.name)}_t)` : "";
  return `    ${access(word)} = ${type.kind === "flag" ? "0 != get_whole()" : `${enumeration}get_whole()`};`;
};

const putLine = (word: Word): string =>
  word.type.kind === "real" ? `    put_real(${access(word)});` : `    put_whole((word_t)${access(word)});`;

const call = (layout: Layout, entry: string | undefined): string => {
  const found = layout.entries.find((each) => each.function === entry);
  return found === undefined
    ? ""
    : `${found.printed}(${found.parameters.map(({ struct }) => `&${variable(struct)}`).join(", ")})`;
};

const variables = (layout: Layout): readonly string[] =>
  layout.structs
    .filter(({ outer }) => outer)
    .map(({ name, printed }) => `static ${printed} ${variable(name)};`);

const input = (): readonly string[] => [
  "static int get(void *to, size_t size) { return fread(to, size, 1, stdin) == 1; }",
  "static real_t get_real(void) { real_t x = 0; if (!get(&x, sizeof x)) { exit(2); } return x; }",
  "static word_t get_whole(void) { word_t x = 0; if (!get(&x, sizeof x)) { exit(2); } return x; }",
];

const output = (): readonly string[] => [
  "static void put(const void *from, size_t size) { if (fwrite(from, size, 1, stdout) != 1) { exit(3); } }",
  "static void put_whole(word_t x) { put(&x, sizeof x); }",
  "static void put_real(real_t x) { if (x != x) { put_whole(QUIET_NAN); } else { put(&x, sizeof x); } }",
];

const main = (layout: Layout, frames: FrameLayout): readonly string[] => {
  const names = entryNames(layout);
  const check = call(layout, names.check);
  const fast = call(layout, names.fast);
  return [
    "int main(void)",
    "{",
    "    uint32_t frames = 0, fast = 0, slow = 0;",
    "    setvbuf(stdout, NULL, _IOFBF, 1 << 16);",
    "    if (!get(&frames, sizeof frames)) { return 2; }",
    ...frames.calibration.map((word) => getLine(layout, word)),
    `    put_whole((word_t)${check === "" ? "-1" : check});`,
    `    ${call(layout, names.init)};`,
    "    dump();",
    "    for (uint32_t frame = 0; frame < frames; frame++) {",
    "        const word_t run = get_whole();",
    "        get_inputs();",
    ...(fast === "" ? [] : [`        if (run & ${RUN_FAST}) { ${fast}; fast++; }`]),
    `        if (run & ${RUN_SLOW}) { ${call(layout, names.slow)}; slow++; }`,
    "        dump();",
    "    }",
    "    put_whole((word_t)fast);",
    "    put_whole((word_t)slow);",
    "    return fflush(stdout) == 0 ? 0 : 3;",
    "}",
  ];
};

/** `<name>_record.c`: links with the generated C, reads frames from stdin, writes the recording to stdout. */
export const printHarness = (program: Program): string => {
  const layout = layoutOf(program);
  const frames = frameLayout(layout);
  const isNarrow = frames.wordBytes === 4;
  return [
    `/* ${program.name}_record.c - records every output, state and exchange field of each step. Test equipment. */`,
    `#include "${namesOf(program).stem}.h"`,
    "#include <stdio.h>",
    "#include <stdlib.h>",
    `typedef ${isNarrow ? "float" : "double"} real_t;`,
    `typedef ${isNarrow ? "int32_t" : "int64_t"} word_t;`,
    `#define QUIET_NAN ${isNarrow ? "0x7fc00000" : "0x7ff8000000000000"}`,
    ...variables(layout),
    ...input(),
    ...output(),
    "static void get_inputs(void)",
    "{",
    ...frames.input.map((word) => getLine(layout, word)),
    "}",
    "static void dump(void)",
    "{",
    ...frames.dump.map(putLine),
    "}",
    ...main(layout, frames),
    "",
  ].join("\n");
};
