import { createHash } from "node:crypto";
import { readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, test } from "vitest";
import { GENERATOR_VERSION, generateKit } from "../../generator/index.ts";
import { exampleSpec, readSpec, runtimeText } from "../agreement/compile-spec.ts";
import { ROOT } from "../support/run-cli.ts";
import { SKARN24, smallestText } from "../support/smallest.ts";
import { runIn, writeAll } from "./native.ts";

const runtime = runtimeText();
const kit = generateKit(exampleSpec(SKARN24), runtime);
const text = (name: string): string => kit.files.get(name) ?? "";

describe("the kit of the complete example", () => {
  test("holds the C, its twin, the build file and the manifest", () => {
    expect([...kit.files.keys()].sort()).toEqual([
      "Makefile",
      "manifest.json",
      "skarn24_boost.c",
      "skarn24_boost.h",
      "skarn24_boost.ts",
      "skarn24_boost_cal.c",
    ]);
  });
  test("the manifest names version and the hash of every other file", () => {
    const manifest = JSON.parse(text("manifest.json"));
    expect(manifest.generator).toBe(GENERATOR_VERSION);
    const others = [...kit.files].filter(([name]) => name !== "manifest.json");
    const hashes = others.map(([name, content]) => [
      name,
      createHash("sha256").update(content).digest("hex"),
    ]);
    expect(manifest.files).toEqual(Object.fromEntries(hashes));
  });
  test("the version is the package's", () => {
    expect(GENERATOR_VERSION).toBe(JSON.parse(readFileSync(join(ROOT, "package.json"), "utf8")).version);
  });
  test("twice the same input gives the same bytes", () => {
    expect(generateKit(exampleSpec(SKARN24), runtime).files).toEqual(kit.files);
  });
  test("no date, path or user stands in any file", () => {
    for (const content of kit.files.values()) {
      expect(content).not.toMatch(/20\d\d-\d\d-\d\d|\/home\/|\/tmp\/|\/usr\/|\/root/);
    }
  });
  test("every file is plain ASCII with lines that fit a page", () => {
    for (const [name, content] of kit.files) {
      expect(content, name).toMatch(/^[\t\n\x20-\x7e]*$/);
      if (/\.(?:c|h|ts)$/.test(name)) {
        for (const line of content.split("\n")) expect(line.length, line).toBeLessThanOrEqual(130);
      }
    }
  });
  test("sentences of the runtime reach the C", () => {
    const c = text("skarn24_boost.c");
    for (const sentence of [
      "y[k] = y[k-1] + (x[k] - y[k-1]) dt / (tau + dt)",
      "source: Astrom & Hagglund, Advanced PID Control, 2006",
      "Latched trip: true means the gate opens fully and torque is limited in this same fast step.",
      "floor = base(engine speed) + g (predicted - reference) + integral",
    ]) {
      expect(c).toContain(sentence);
    }
  });
  test("every calibration value names its line in the spec", () => {
    const lines = text("skarn24_boost_cal.c")
      .split("\n")
      .filter((line) => /^\s+\.\w+ = [^{]/.test(line));
    expect(lines.length).toBeGreaterThan(40);
    for (const line of lines) expect(line).toMatch(/skarn24\.yaml:\d+ \*\/$/);
  });
  test("the twin passes the strict compiler", () => {
    const folder = writeAll(kit.files);
    const args = [
      "--noEmit",
      "--strict",
      "--target",
      "es2022",
      "--types",
      "",
      "--noUnusedLocals",
      "skarn24_boost.ts",
    ];
    expect(runIn(folder, join(ROOT, "node_modules/.bin/tsc"), args)).toEqual({ code: 0, said: "" });
  });
  test("the cautions stand in the header", () => {
    expect(text("skarn24_boost.h")).toContain(
      "Keep an independent mechanical or electrical overspeed and overboost protection.",
    );
  });
});

describe("the hash of the meaning", () => {
  const bannerOf = (spec: string) =>
    generateKit(readSpec(spec, "smallest.yaml"), runtime).files.get("skarn_smallest.c");

  test("moving a comment in the spec changes no byte of the code", () => {
    expect(bannerOf(`# a comment more\n# and another\n${smallestText()}`)).toBe(bannerOf(smallestText()));
  });
  test("changing a value changes the hash", () => {
    expect(bannerOf(smallestText().replace("190 kPa abs", "191 kPa abs"))).not.toBe(bannerOf(smallestText()));
  });
});

describe("a hostile description", () => {
  test("cannot leave its comment", () => {
    const hostile = smallestText().replace(/description: .*/, 'description: "x */ int evil; /* ??/ // é"');
    const { files } = generateKit(readSpec(hostile, "smallest.yaml"), runtime);
    expect(files.get("skarn_smallest.c")).toContain("x * / int evil; / * ? ?/ / / ?");
    expect(runIn(writeAll(files), "make", ["CC=gcc"]).code).toBe(0);
  });
});
