import { existsSync, mkdirSync, readdirSync, readFileSync, symlinkSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { writeFolderWhole } from "../../../cli/files/write-folder.ts";
import { scratchFolder } from "../../support/scratch.ts";

const manifest = (...paths: string[]) =>
  JSON.stringify({ files: paths.map((path) => ({ path, sha256: "" })) });
const output = (files: Record<string, string>): Map<string, string> =>
  new Map([...Object.entries(files), ["manifest.json", manifest(...Object.keys(files))]]);

test("writes files and the folders they stand in", () => {
  const folder = join(scratchFolder(), "deep/er");
  writeFolderWhole(folder, output({ "a.c": "1", "sub/b.c": "2" }));
  expect(readFileSync(join(folder, "a.c"), "utf8")).toBe("1");
  expect(readFileSync(join(folder, "sub/b.c"), "utf8")).toBe("2");
});

test("replaces its own earlier output, drops what is stale and keeps what others put there", () => {
  const folder = join(scratchFolder(), "kit");
  writeFolderWhole(folder, output({ "old.c": "1", "both.c": "1" }));
  writeFileSync(join(folder, "notes.txt"), "mine");
  writeFolderWhole(folder, output({ "both.c": "2" }));
  expect(readdirSync(folder).sort()).toEqual(["both.c", "manifest.json", "notes.txt"]);
  expect(readFileSync(join(folder, "both.c"), "utf8")).toBe("2");
});

test("refuses a folder with somebody else's files and leaves it alone", () => {
  const folder = scratchFolder();
  writeFileSync(join(folder, "thesis.txt"), "years of work");
  expect(() => writeFolderWhole(folder, output({ "a.c": "1" }))).toThrow("was not written by spoolwright");
  expect(readdirSync(folder)).toEqual(["thesis.txt"]);
});

test("refuses to replace a file of its own folder that it did not write", () => {
  const folder = join(scratchFolder(), "kit");
  writeFolderWhole(folder, output({ "a.c": "1" }));
  writeFileSync(join(folder, "b.c"), "mine");
  expect(() => writeFolderWhole(folder, output({ "b.c": "theirs" }))).toThrow("did not write");
  expect(readFileSync(join(folder, "b.c"), "utf8")).toBe("mine");
});

test("refuses a symbolic link in the folder's place", () => {
  const scratch = scratchFolder();
  mkdirSync(join(scratch, "elsewhere"));
  symlinkSync(join(scratch, "elsewhere"), join(scratch, "kit"));
  expect(() => writeFolderWhole(join(scratch, "kit"), output({ "a.c": "1" }))).toThrow("symbolic link");
  expect(readdirSync(join(scratch, "elsewhere"))).toEqual([]);
});

test.each(["../escape.c", "/escape.c", "sub/../../escape.c", ".."])("refuses the file name %s", (name) => {
  const scratch = scratchFolder();
  expect(() => writeFolderWhole(join(scratch, "kit"), new Map([[name, "x"]]))).toThrow(
    "outside the output folder",
  );
  expect(readdirSync(scratch)).toEqual([]);
});

test("a failure half way leaves the earlier output and no partial folder", () => {
  const scratch = scratchFolder();
  const folder = join(scratch, "kit");
  writeFolderWhole(folder, output({ "a.c": "1" }));
  const clash = output({ "a.c": "2", sub: "a file", "sub/b.c": "needs a folder of the same name" });
  expect(() => writeFolderWhole(folder, clash)).toThrow();
  expect(readFileSync(join(folder, "a.c"), "utf8")).toBe("1");
  expect(readdirSync(scratch)).toEqual(["kit"]);
});

test("a file where the folder should be is wrong use", () => {
  const file = join(scratchFolder(), "kit");
  writeFileSync(file, "");
  expect(() => writeFolderWhole(file, output({ "a.c": "1" }))).toThrow("is a file, not a folder");
  expect(existsSync(file)).toBe(true);
});
