import { expect, test } from "vitest";
import { textOf } from "./repository.ts";

const namesIn = (path: string, pattern: RegExp): string[] =>
  [...textOf(path).matchAll(pattern)].map((found) => found[1]).sort();

test("the test runner and the tests know the same tools", () => {
  const inRunner = namesIn(".ci/tools.mjs", /^ {2}(\w+): \(\) =>/gm);
  const inTests = namesIn("test/support/tool.ts", /^ {2}(\w+): \(\) =>/gm);
  expect(inRunner.length).toBeGreaterThan(0);
  expect(inTests).toEqual(inRunner);
});

test("the set-up script is executable bash and the test command is one npm script", () => {
  expect(textOf(".ci/set-up")).toMatch(/^#!\/usr\/bin\/env bash\n/);
  expect(JSON.parse(textOf("package.json")).scripts.test).toBe("node .ci/test.mjs");
});
