import { expect, test } from "vitest";
import { FOLDERS, sourcesUnder, textOf, withoutComments } from "./repository.ts";

/** The places that may touch the machine. */
const MAY_TOUCH = [/^cli\//, /^verification\/([a-z-]+\/)?(worker|evidence-store)[a-z-]*\.ts$/];

const IMPURE: readonly (readonly [string, RegExp])[] = [
  [
    "disk, processes or network",
    /"node:(fs|fs\/promises|child_process|net|http|https|os|worker_threads|process)"/,
  ],
  ["the clock", /\bDate\b\s*[.(]|\bnew Date\b|\bperformance\.now\b|\bhrtime\b|\bset(Timeout|Interval)\(/],
  ["chance", /\bMath\.random\b|"node:crypto"\)?.*random|\bcrypto\.getRandom/],
  ["the process", /\bprocess\.(env|argv|exit|stdout|stderr|cwd|platform)\b/],
  ["the console", /\bconsole\./],
  ["code from text", /\beval\(|\bnew Function\b|"node:vm"/],
];

const pureSources = (): string[] =>
  FOLDERS.flatMap(sourcesUnder).filter((path) => !MAY_TOUCH.some((place) => place.test(path)));

test.each(IMPURE)(
  "%s is touched only by cli, the worker entry point and the evidence store",
  (_what, pattern) => {
    const offenders = pureSources().filter((path) => pattern.test(withoutComments(textOf(path))));
    expect(offenders).toEqual([]);
  },
);

// The last bits of the other functions of Math differ between engines.
test("runtime and hil-sim use of Math only what every machine rounds alike", () => {
  const exact = ["sqrt", "abs", "floor", "trunc", "fround", "imul", "min", "max"];
  const offenders = ["runtime", "hil-sim"]
    .flatMap(sourcesUnder)
    .flatMap((path) =>
      [...withoutComments(textOf(path)).matchAll(/\bMath\.(\w+)/g)]
        .filter((use) => !exact.includes(use[1]))
        .map((use) => `${path} uses Math.${use[1]}`),
    );
  expect(offenders).toEqual([]);
});
