import { linkSync, mkdirSync, readdirSync, readFileSync, symlinkSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { CommandFailure } from "../../../cli/command-failure.ts";
import { type Outputs, requireOutputFolder, requireOutputs } from "../../../cli/files/require-outputs.ts";
import { writeFileWhole } from "../../../cli/files/write-file.ts";
import { writeFolderWhole } from "../../../cli/files/write-folder.ts";
import { scratchFolder } from "../../support/scratch.ts";

/** A folder with a spec, and what the check says of outputs beside it. */
function scene() {
  const folder = scratchFolder();
  const at = (name: string): string => join(folder, name);
  writeFileSync(at("spec.yaml"), "spec");
  const check = (outputs: Outputs) => () => requireOutputs(outputs, [at("spec.yaml"), undefined]);
  return { folder, at, check };
}

test("fresh outputs, earlier outputs and folders still to be made are fine, and nothing is left of the trial", () => {
  const { folder, at, check } = scene();
  writeFileSync(at("old.csv"), "old");
  const outputs = { "--csv": at("old.csv"), "--plot": at("new/deep/a.svg"), "--report": undefined };
  expect(check(outputs)).not.toThrow();
  expect(readdirSync(folder).sort()).toEqual(["old.csv", "spec.yaml"]);
  expect(readFileSync(at("old.csv"), "utf8")).toBe("old");
});

test.each(["itself", "a detour", "a symbolic link", "a hard link", "a linked folder"])(
  "an input named by %s is no output",
  (name) => {
    const { folder, at, check } = scene();
    symlinkSync(at("spec.yaml"), at("soft"));
    linkSync(at("spec.yaml"), at("hard"));
    symlinkSync(folder, at("folder"));
    const paths: Record<string, string> = {
      itself: at("spec.yaml"),
      "a detour": `${folder}/none/../spec.yaml`,
      "a symbolic link": at("soft"),
      "a hard link": at("hard"),
      "a linked folder": at("folder/spec.yaml"),
    };
    expect(check({ "--csv": paths[name] })).toThrow(/--csv .* would overwrite .*spec\.yaml/);
  },
);

test("the target of an input that is a link is no output", () => {
  const { at } = scene();
  symlinkSync(at("spec.yaml"), at("soft"));
  expect(() => requireOutputs({ "--csv": at("spec.yaml") }, [at("soft")])).toThrow("would overwrite");
});

test("two outputs are two files, also where neither is there yet", () => {
  const { folder, at, check } = scene();
  symlinkSync(folder, at("folder"));
  expect(check({ "--csv": at("a"), "--plot": at("x/../a") })).toThrow(/--csv .* and --plot .* the same file/);
  expect(check({ "--csv": at("new/a"), "--plot": at("folder/new/a") })).toThrow("the same file");
  expect(check({ "--csv": at("a"), "--plot": at("a/b") })).toThrow(/--plot .* lies in --csv/);
  expect(check({ "--csv": at("a"), "--plot": at("ab") })).not.toThrow();
});

test("a path that cannot be written is refused in plain words before the work", () => {
  const { folder, at, check } = scene();
  mkdirSync(at("folder"));
  symlinkSync(at("nowhere"), at("broken"));
  symlinkSync(at("round"), at("round"));
  for (const [path, words] of [
    [at("spec.yaml/x.json"), "spec.yaml is a file, not a folder"],
    [at("spec.yaml/x/y.json"), "spec.yaml is a file, not a folder"],
    [at("folder"), "it is a folder"],
    ["/dev/null", "it is a device or a pipe"],
    [at("broken/x.json"), "is a symbolic link to nothing"],
    [at("round/x.json"), "symbolic links go round"],
    [at("n".repeat(300)), "the name is too long"],
  ]) {
    expect(check({ "--evidence": path })).toThrow(CommandFailure);
    expect(check({ "--evidence": path })).toThrow(`cannot write --evidence ${path}: `);
    expect(check({ "--evidence": path })).toThrow(words);
  }
  expect(readdirSync(folder).sort()).toEqual(["broken", "folder", "round", "spec.yaml"]);
});

test.skipIf(process.platform !== "linux")("a file system that makes no files is refused, and soon", () => {
  const { check } = scene();
  for (const path of ["/proc/x/y.json", "/proc/y.json"]) {
    expect(check({ "--evidence": path })).toThrow(CommandFailure);
    expect(() => writeFileWhole(path, "")).toThrow(CommandFailure);
    expect(() => writeFolderWhole(path, new Map())).toThrow(CommandFailure);
  }
});

test("a failed write tells its own error, not that of the cleaning up", () => {
  const { at } = scene();
  expect(() => writeFileWhole(at("spec.yaml/x.json"), "")).toThrow("spec.yaml is a file, not a folder");
  expect(() => writeFolderWhole(at("spec.yaml/kit"), new Map())).toThrow(CommandFailure);
  expect(readFileSync(at("spec.yaml"), "utf8")).toBe("spec");
});

test("an output folder holds no input", () => {
  const { folder, at } = scene();
  const check = (path: string) => () => requireOutputFolder("--out", path, [at("spec.yaml")]);
  expect(check(folder)).toThrow(/--out .* holds .*spec\.yaml/);
  expect(check(at("kit/deep"))).not.toThrow();
  expect(check(at("spec.yaml/kit"))).toThrow("spec.yaml is a file, not a folder");
});
