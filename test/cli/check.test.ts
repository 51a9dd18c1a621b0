import { copyFileSync, mkdirSync, readdirSync, symlinkSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { ROOT, runCli } from "../support/run-cli.ts";
import { scratchFolder } from "../support/scratch.ts";
import { SKARN24, SKARN24_PLANT, SMALLEST, smallestText } from "../support/smallest.ts";

const brokenText = (): string => smallestText().replace(/step: \d+ ms/, "step: 5 kPa");

const write = (text: string | Uint8Array): { folder: string; spec: string } => {
  const folder = scratchFolder();
  const spec = join(folder, "loop.yaml");
  writeFileSync(spec, text);
  return { folder, spec };
};

describe("a spec without errors", () => {
  test.each([SMALLEST, SKARN24])("%s: exit 0, one plain line", (spec) => {
    expect(runCli(["check", spec])).toEqual({ code: 0, out: `${spec}: no errors\n`, err: "" });
  });

  test("--json: one document and nothing else", () => {
    const run = runCli(["check", SMALLEST, "--json"]);
    expect({ ...run, out: JSON.parse(run.out) }).toEqual({
      code: 0,
      out: { ok: true, diagnostics: [] },
      err: "",
    });
  });

  test("--quiet: nothing at all", () => {
    expect(runCli(["check", SMALLEST, "--quiet"])).toEqual({ code: 0, out: "", err: "" });
  });
});

describe("a spec with an error", () => {
  test("exit 1; place, sentence, code, the line and a caret on standard error", () => {
    const { spec } = write(brokenText());
    const line =
      brokenText()
        .split("\n")
        .findIndex((text) => text.includes("step: 5 kPa")) + 1;
    const run = runCli(["check", spec]);
    expect(run).toMatchObject({ code: 1, out: "" });
    expect(run.err).toMatch(new RegExp(`loop\\.yaml:${line}:\\d+: error: [\\s\\S]*\\(wrong-unit\\)`));
    expect(run.err).toContain("step: 5 kPa");
    expect(run.err).toContain("^");
  });

  test("--quiet still says what is wrong", () => {
    expect(runCli(["check", write(brokenText()).spec, "--quiet"]).err).toContain("wrong-unit");
  });

  test("--json: the documented fields, silent otherwise", () => {
    const run = runCli(["check", write(brokenText()).spec, "--json"]);
    const document = JSON.parse(run.out);
    expect(run).toMatchObject({ code: 1, err: "" });
    expect(document.ok).toBe(false);
    const fields = [
      "code",
      "severity",
      "file",
      "line",
      "column",
      "endLine",
      "endColumn",
      "message",
      "because",
      "fix",
    ];
    for (const field of fields) expect(document.diagnostics[0]).toHaveProperty(field);
    expect(document.diagnostics[0]).toMatchObject({
      code: "wrong-unit",
      severity: "error",
      because: expect.any(Array),
    });
  });

  test("no colour reaches a pipe, NO_COLOR or not", () => {
    const { spec } = write(brokenText());
    const escapeCharacter = String.fromCharCode(27);
    for (const env of [{}, { NO_COLOR: "1" }, { FORCE_COLOR: "1", NO_COLOR: "1" }]) {
      expect(runCli(["check", spec], { env }).err).not.toContain(escapeCharacter);
    }
  });
});

/** Every way in which the path itself can be wrong; each must end as a finding with a place. */
const BAD_INPUT: Readonly<Record<string, { code: string; make: (folder: string, spec: string) => void }>> = {
  "no file": { code: "file-missing", make: () => {} },
  "a folder": { code: "file-is-folder", make: (_folder, spec) => mkdirSync(spec) },
  "an empty file": { code: "empty-file", make: (_folder, spec) => writeFileSync(spec, "") },
  "a file of zeros": { code: "", make: (_folder, spec) => writeFileSync(spec, new Uint8Array(4096)) },
  "binary bytes": {
    code: "not-utf8",
    make: (_folder, spec) => writeFileSync(spec, Uint8Array.of(0x7f, 0x45, 0xff, 0xfe)),
  },
  "three megabytes": {
    code: "file-too-large",
    make: (_folder, spec) => writeFileSync(spec, "#".repeat(3e6)),
  },
  "a device": { code: "file-unreadable", make: (_folder, spec) => symlinkSync("/dev/zero", spec) },
  "a link to nowhere": {
    code: "file-missing",
    make: (folder, spec) => symlinkSync(join(folder, "none"), spec),
  },
  "broken YAML": { code: "", make: (_folder, spec) => writeFileSync(spec, "a: [1, {b: 'c\n- d") },
  "a thousand brackets": { code: "", make: (_folder, spec) => writeFileSync(spec, "[".repeat(1000)) },
};

test.each(Object.entries(BAD_INPUT))(
  "%s as spec: exit 1, a finding with a place",
  (_what, { code, make }) => {
    const folder = scratchFolder();
    const spec = join(folder, "loop.yaml");
    make(folder, spec);
    const run = runCli(["check", spec, "--json"]);
    expect(run).toMatchObject({ code: 1, err: "" });
    const { diagnostics } = JSON.parse(run.out);
    expect(diagnostics.length).toBeGreaterThan(0);
    for (const finding of diagnostics)
      expect(finding).toMatchObject({ file: spec, line: expect.any(Number) });
    if (code !== "") expect(diagnostics[0].code).toBe(code);
  },
);

describe("the plant file beside the spec", () => {
  const withPlant = (path: string): { folder: string; spec: string } =>
    write(`${smallestText().replace(/^plant:.*$/m, "")}\nplant: ${path}\n`);

  test("is read from the spec's folder, wherever the command runs", () => {
    const { folder, spec } = withPlant("./engine.plant.yaml");
    copyFileSync(join(ROOT, SKARN24_PLANT), join(folder, "engine.plant.yaml"));
    expect(runCli(["check", spec, "--json"], { cwd: "/" }).out).not.toContain("plant-file");
  });

  test.each(["./none.yaml", "../engine.yaml", "/etc/hostname"])(
    "%s is refused with a place in the spec",
    (path) => {
      const { spec } = withPlant(path);
      const run = runCli(["check", spec, "--json"]);
      expect(run.code).toBe(1);
      expect(run.out).toMatch(/"code": "plant-(file-missing|path-outside)"/);
    },
  );

  test("a link that leaves the folder is not followed", () => {
    const { folder, spec } = withPlant("./engine.plant.yaml");
    symlinkSync(join(ROOT, SKARN24_PLANT), join(folder, "engine.plant.yaml"));
    expect(runCli(["check", spec, "--json"]).out).toContain("plant-file-missing");
  });

  test("its own errors carry its own name", () => {
    const { folder, spec } = withPlant("./engine.plant.yaml");
    writeFileSync(join(folder, "engine.plant.yaml"), Uint8Array.of(0xff));
    const { diagnostics } = JSON.parse(runCli(["check", spec, "--json"]).out);
    expect(diagnostics.map((finding: { file: string }) => finding.file)).toContain(
      join(folder, "engine.plant.yaml"),
    );
  });
});

test("check writes nothing", () => {
  const { folder, spec } = write(smallestText());
  runCli(["check", spec], { cwd: folder });
  expect(readdirSync(folder)).toEqual(["loop.yaml"]);
});
