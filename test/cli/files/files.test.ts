import { execFileSync } from "node:child_process";
import { mkdirSync, readdirSync, readFileSync, symlinkSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { readLimited } from "../../../cli/files/read-limited.ts";
import { writeFileWhole } from "../../../cli/files/write-file.ts";
import { scratchFolder } from "../../support/scratch.ts";

test("reads a file up to the limit, and not one byte more", () => {
  const path = join(scratchFolder(), "a");
  writeFileSync(path, "12345");
  expect(readLimited(path, 5)).toEqual({ ok: true, bytes: Buffer.from("12345") });
  expect(readLimited(path, 4)).toEqual({ ok: false, problem: "too_large" });
});

test("an empty file is a file", () => {
  const path = join(scratchFolder(), "a");
  writeFileSync(path, "");
  expect(readLimited(path, 5)).toEqual({ ok: true, bytes: Buffer.alloc(0) });
});

test("says what is wrong with a missing file, a folder, a device and a pipe nobody writes to", () => {
  const folder = scratchFolder();
  execFileSync("mkfifo", [join(folder, "pipe")]);
  expect(readLimited(join(folder, "none"), 5)).toEqual({ ok: false, problem: "missing" });
  expect(readLimited(join(folder, "none/deeper"), 5)).toEqual({ ok: false, problem: "missing" });
  expect(readLimited(folder, 5)).toEqual({ ok: false, problem: "directory" });
  expect(readLimited("/dev/zero", 5)).toEqual({ ok: false, problem: "not_a_file" });
  expect(readLimited(join(folder, "pipe"), 5)).toEqual({ ok: false, problem: "not_a_file" });
});

test("writes a whole file, makes its folder and leaves nothing beside it", () => {
  const folder = scratchFolder();
  writeFileWhole(join(folder, "new/a.csv"), "1");
  writeFileWhole(join(folder, "new/a.csv"), "2");
  expect(readFileSync(join(folder, "new/a.csv"), "utf8")).toBe("2");
  expect(readdirSync(join(folder, "new"))).toEqual(["a.csv"]);
});

test("replaces a symbolic link instead of writing through it", () => {
  const folder = scratchFolder();
  writeFileSync(join(folder, "precious"), "keep");
  symlinkSync(join(folder, "precious"), join(folder, "out.csv"));
  writeFileWhole(join(folder, "out.csv"), "new");
  expect(readFileSync(join(folder, "precious"), "utf8")).toBe("keep");
});

test("a folder in the way is a plain sentence and leaves no partial file", () => {
  const folder = scratchFolder();
  mkdirSync(join(folder, "out.csv"));
  expect(() => writeFileWhole(join(folder, "out.csv"), "x")).toThrow(
    /cannot write .*out\.csv: it is a folder/,
  );
  expect(readdirSync(folder)).toEqual(["out.csv"]);
});
