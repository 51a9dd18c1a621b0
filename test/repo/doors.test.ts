import { existsSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { FOLDERS, ROOT, sourcesUnder, textOf } from "./repository.ts";

const WITH_DOOR = FOLDERS.filter((folder) => folder !== "cli");

test.each([...FOLDERS, "examples", "verification/report"])("%s has a README", (folder) => {
  expect(existsSync(join(ROOT, folder, "README.md"))).toBe(true);
});

test.each(WITH_DOOR)("the door of %s names what it gives, one by one", (folder) => {
  const door = textOf(`${folder}/index.ts`);
  expect(door).not.toMatch(/export \*/);
  expect(door).toMatch(/^export /m);
});

test("folders enter each other by their doors", () => {
  const inside = /from "(?:\.\.\/)+((?:spec|runtime|generator|hil-sim|verification)\/[^"]+)"/g;
  const doors = /^(spec|runtime|generator|hil-sim|verification|verification\/report)\/index\.ts$/;
  const offences = FOLDERS.flatMap(sourcesUnder).flatMap((path) =>
    [...textOf(path).matchAll(inside)]
      .filter((found) => !doors.test(found[1]))
      .map((found) => `${path} imports ${found[1]}`),
  );
  expect(offences).toEqual([]);
});
