import { expect, test } from "vitest";
import { FOLDERS, filesUnder, sourcesUnder, textOf, withoutComments } from "./repository.ts";

const isText = (path: string): boolean => /\.(ts|mjs|json|md|yaml|c|h|html|svg|csv|txt)$/.test(path);
const lineCount = (path: string): number => textOf(path).split("\n").length - 1;

test("no file holds a path of somebody's machine", () => {
  const machinePath = /(?<![\w.])\/(work|home|root|Users|private)\/[\w.]|[A-Z]:\\(Users|work)\b/;
  const offenders = filesUnder(".").filter((path) => isText(path) && machinePath.test(textOf(path)));
  expect(offenders).toEqual([]);
});

test("a source file over 300 lines is a data table or says at its head why", () => {
  const silent = FOLDERS.flatMap(sourcesUnder)
    .filter((path) => lineCount(path) > 300 && !path.endsWith("-table.ts"))
    .filter((path) => !/^(\/\/|\/\*)[\s\S]{0,400}\blines\b/.test(textOf(path)));
  expect(silent).toEqual([]);
});

test("half of the source files have at most 90 lines", () => {
  const sizes = FOLDERS.flatMap(sourcesUnder)
    .map(lineCount)
    .sort((a, b) => a - b);
  expect(sizes[Math.floor(sizes.length / 2)]).toBeLessThanOrEqual(90);
});

const self = "test/repo/tidiness.test.ts";

test("no test is skipped or alone by decree, no rule is switched off", () => {
  const marks = /\b(it|test|describe)\.(skip|todo|only)\(|@ts-(ignore|expect-error|nocheck)|biome-ignore/;
  const offenders = [...FOLDERS, "test"]
    .flatMap(sourcesUnder)
    .filter((path) => path !== self && marks.test(textOf(path)));
  expect(offenders).toEqual([]);
});

test("nothing has the type any", () => {
  const offenders = [...FOLDERS, "test"]
    .flatMap(sourcesUnder)
    .filter((path) => path !== self && /: any\b|\bas any\b|<any\b/.test(withoutComments(textOf(path))));
  expect(offenders).toEqual([]);
});

test("sources are named in kebab-case", () => {
  const offenders = FOLDERS.flatMap(sourcesUnder).filter(
    (path) => !/\/[a-z0-9]+(-[a-z0-9]+)*(\.d)?\.ts$/.test(path),
  );
  expect(offenders).toEqual([]);
});
