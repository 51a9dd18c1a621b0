import { builtinModules } from "node:module";
import { posix } from "node:path";
import { expect, test } from "vitest";
import { FOLDERS, sourcesUnder, textOf } from "./repository.ts";

/** What each folder may import: folders of ours, and packages. */
const ALLOWED: Record<(typeof FOLDERS)[number], { ours: string[]; packages: string[] | "any" }> = {
  runtime: { ours: [], packages: [] },
  spec: { ours: [], packages: "any" },
  generator: { ours: ["spec"], packages: "any" },
  "hil-sim": { ours: ["spec"], packages: "any" },
  verification: { ours: ["spec", "runtime", "generator", "hil-sim"], packages: "any" },
  cli: { ours: ["spec", "runtime", "generator", "hil-sim", "verification"], packages: "any" },
};

const IMPORT = /^(?:import|export)\s[^;"]*?from\s+"([^"]+)"|^import\s+"([^"]+)"|\bimport\("([^"]+)"\)/gm;
const importsOf = (path: string): string[] =>
  [...textOf(path).matchAll(IMPORT)].map((found) => found[1] ?? found[2] ?? found[3]);

const topFolder = (path: string): string => path.split("/")[0];

function offences(folder: (typeof FOLDERS)[number]): string[] {
  const { ours, packages } = ALLOWED[folder];
  return sourcesUnder(folder).flatMap((path) =>
    importsOf(path).flatMap((wanted) => {
      if (!wanted.startsWith(".")) return packages === "any" ? [] : [`${path} imports ${wanted}`];
      const target = topFolder(posix.join(posix.dirname(path), wanted));
      return target === folder || ours.includes(target) ? [] : [`${path} imports ${wanted}`];
    }),
  );
}

test.each(FOLDERS)("%s imports only what stands before it", (folder) => {
  expect(offences(folder)).toEqual([]);
});

test("packages are named in package.json, node's own modules start with node:", () => {
  const declared = JSON.parse(textOf("package.json")).dependencies;
  const undeclared = FOLDERS.flatMap(sourcesUnder).flatMap((path) =>
    importsOf(path)
      .filter((wanted) => !wanted.startsWith(".") && !wanted.startsWith("node:"))
      .map((wanted) => ({ path, name: wanted.split("/", wanted.startsWith("@") ? 2 : 1).join("/") }))
      .filter(({ name }) => builtinModules.includes(name) || declared[name] === undefined)
      .map(({ path: from, name }) => `${from} imports ${name}`),
  );
  expect(undeclared).toEqual([]);
});
