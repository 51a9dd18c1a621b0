import { expect, test } from "vitest";
import { compileProgram, kitFiles, packRuntime, useParsedRuntime } from "../../generator/index.ts";
import { SPECIMEN, specimenProgram, specimenText } from "./specimen/lowered.ts";

test("the parsed form gives the same files as the text", () => {
  const runtime = specimenText();
  expect(useParsedRuntime(runtime, packRuntime(specimenText()))).toBe(true);
  const { program } = compileProgram({ runtime, lowered: SPECIMEN });
  expect(program && kitFiles(program)).toEqual(kitFiles(specimenProgram()));
});

test("the parsed form of another text is not used", () => {
  const packed = packRuntime(specimenText());
  const runtime = specimenText();
  runtime.set("specimen/specimen.ts", `${runtime.get("specimen/specimen.ts")}\nclass Thing {}\n`);
  expect(useParsedRuntime(runtime, packed)).toBe(false);
  expect(compileProgram({ runtime, lowered: SPECIMEN }).refusals.map(({ code }) => code)).toEqual([
    "unsupported-declaration",
  ]);
});
