import { describe, expect, test } from "vitest";
import {
  type Diagnostic,
  decodeSource,
  diagnosticsJson,
  explain,
  readLoopSpec,
  readPlant,
  renderDiagnostics,
  type Source,
} from "../../spec/index.ts";
import { openTestFile, SMALLEST, testFile } from "./files.ts";
import { mutate, mutateBytes } from "./mutate.ts";

/** Mutated specs in all: FUZZ_SPECS=1000000 npx vitest run test/spec/fuzz.test.ts. */
const COUNT = Number(process.env.FUZZ_SPECS ?? 20_000);
/** No mutated spec may take longer; an unmutated one takes some milliseconds. */
const LONGEST_MS = 10_000;
/** For a machine that is busy with other things. */
const PATIENCE = Math.max(600_000, COUNT * 60);
const FIRST_SEED = Number(process.env.FUZZ_SEED ?? 1);

const COMPLETE = testFile("complete.yaml").text;
const PLANT = testFile("engine.plant.yaml").text;

type Lines = ReadonlyMap<string, readonly string[]>;
const linesOf = (sources: readonly Source[]): Lines =>
  new Map(sources.map(({ file, text }) => [file, text.split("\n")]));

function placeProblem({ at, message, code }: Diagnostic, files: Lines): string | undefined {
  const lines = files.get(at.file);
  if (lines === undefined) return `no such file: ${at.file}`;
  const inside = (line: number, column: number): boolean =>
    line >= 1 && line <= lines.length && column >= 1 && column <= lines[line - 1].length + 2;
  if (!inside(at.line, at.column) || !inside(at.endLine, at.endColumn))
    return `${at.line}:${at.column} to ${at.endLine}:${at.endColumn} is outside`;
  if (message === "" || explain(code) === undefined) return `nothing said (${code})`;
  return undefined;
}

interface Outcome {
  readonly accepted: boolean;
  readonly diagnostics: readonly Diagnostic[];
  readonly sources: readonly Source[];
}

function readAsLoop(text: string): Outcome {
  const source = { file: "loop.yaml", text };
  const { spec, diagnostics } = readLoopSpec(source, openTestFile);
  return { accepted: spec !== undefined, diagnostics, sources: [source, testPlant] };
}
const testPlant = testFile("engine.plant.yaml");

function readAsPlant(text: string): Outcome {
  const source = { file: "plant.yaml", text };
  const { plant, diagnostics } = readPlant(source);
  return { accepted: plant !== undefined, diagnostics, sources: [source] };
}

/** Everything that must hold for any text; returns what does not. */
function problemWith(read: () => Outcome): string | undefined {
  const start = performance.now();
  const { accepted, diagnostics, sources } = read();
  if (performance.now() - start > LONGEST_MS) return "too slow";
  const errors = diagnostics.some(({ severity }) => severity === "error");
  if (accepted === errors) return accepted ? "accepted with errors" : "refused without an error";
  const files = linesOf(sources);
  for (const each of diagnostics) {
    const problem = placeProblem(each, files);
    if (problem !== undefined) return problem;
  }
  renderDiagnostics(diagnostics, sources, { colour: false, width: 80 });
  return JSON.stringify(diagnosticsJson(diagnostics)) === "" ? "no JSON" : undefined;
}

function firstProblem(count: number, read: (seed: number) => Outcome): string | undefined {
  for (let seed = FIRST_SEED; seed < FIRST_SEED + count; seed += 1) {
    const problem = problemWith(() => read(seed));
    if (problem !== undefined) return `seed ${seed}: ${problem}`;
  }
  return undefined;
}

describe("no text makes the reader throw, hang, or report without a place", () => {
  const share = (part: number): number => Math.ceil(COUNT * part);
  const cases: readonly (readonly [string, number, (seed: number) => Outcome])[] = [
    ["the smallest spec", share(0.76), (seed) => readAsLoop(mutate(SMALLEST, seed))],
    ["the complete spec", share(0.04), (seed) => readAsLoop(mutate(COMPLETE, seed))],
    ["the plant", share(0.08), (seed) => readAsPlant(mutate(PLANT, seed))],
  ];
  test.each(cases)(
    "%s, %d mutations",
    (_, count, read) => {
      expect(firstProblem(count, read)).toBeUndefined();
    },
    PATIENCE,
  );

  test(
    `bytes of a spec, ${share(0.12)} mutations`,
    () => {
      const bytes = new TextEncoder().encode(SMALLEST);
      const read = (seed: number): Outcome => {
        const decoded = decodeSource("loop.yaml", mutateBytes(bytes, seed));
        if (decoded.source !== undefined) return readAsLoop(decoded.source.text);
        const text = new TextDecoder().decode(mutateBytes(bytes, seed));
        return { accepted: false, diagnostics: decoded.diagnostics, sources: [{ file: "loop.yaml", text }] };
      };
      expect(firstProblem(share(0.12), read)).toBeUndefined();
    },
    PATIENCE,
  );

  test("the mutations do reach both sides: some specs are accepted, most are refused", () => {
    const outcomes = Array.from(
      { length: 300 },
      (_, seed) => readAsLoop(mutate(SMALLEST, seed + 1)).accepted,
    );
    const accepted = outcomes.filter((each) => each).length;
    expect(accepted).toBeGreaterThan(10);
    expect(accepted).toBeLessThan(200);
  });
});

describe("hostile files of up to a megabyte end in a diagnostic", () => {
  const filled = (size: number, piece: string): string => piece.repeat(Math.floor(size / piece.length));
  const longest = (piece: string): string => filled(800_000, piece);
  const long = (piece: string): string => filled(300_000, piece);
  test.each([
    ["open brackets", longest("[")],
    ["open braces", long("{a: ")],
    ["nested dashes", long("- ")],
    ["nested question marks", long("? ")],
    ["empty documents", long("---\n")],
    ["keys", Array.from({ length: 30_000 }, (_, i) => `k${i}: 1`).join("\n")],
    ["list elements", `spoolwright: [${long("1,")}1]`],
    ["quotes", `a: '${long("''")}`],
    ["tags", long("!a ")],
    ["colons", long(":")],
    ["digits", `spoolwright: 1\ncontroller: { step: ${long("9")} ms }`],
    ["anchors", `a: [${long("&a x,")}]`],
    ["aliases", `a: &a 1\nb: [${longest("*a,")}]`],
    ["spaces", `${SMALLEST}${long(" ")}`],
    ["tabs", `${SMALLEST}${long("\t\n")}`],
    ["a long key", `${long("k")}: 1`],
    [
      "findings on one line",
      `{ spoolwright: 1, ${Array.from({ length: 90_000 }, (_, i) => `k${i}: 1`).join(", ")} }`,
    ],
    ["units", `spoolwright: 1\ncontroller: { step: 5 ${long("m*")}s }`],
  ])("%s", (_, text) => {
    const { diagnostics, sources } = readAsLoop(text);
    const files = linesOf(sources);
    expect(diagnostics.length).toBeLessThanOrEqual(1000);
    expect(diagnostics.map((each) => placeProblem(each, files)).filter((each) => each !== undefined)).toEqual(
      [],
    );
    expect(renderDiagnostics(diagnostics, sources, { colour: false, width: 80 }).length).toBeLessThan(
      2_000_000,
    );
  });
});
