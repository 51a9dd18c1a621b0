import fc from "fast-check";
import { parseHTML } from "linkedom";
import { describe, expect, test } from "vitest";
import type { Evidence } from "../../../verification/evidence.ts";
import { renderReport } from "../../../verification/report/index.ts";
import { sampleContext } from "./sample-context.ts";
import { sampleEvidence, sampleResult, sampleTrace, violated } from "./sample-evidence.ts";

const read = (text: string): Document => parseHTML(text).document as unknown as Document;

interface Document {
  querySelector(selector: string): { readonly textContent: string } | null;
  querySelectorAll(selector: string): ArrayLike<{ readonly textContent: string; readonly nodeName: string }>;
}

/** The page without its script and style. */
const shown = (document: Document): string =>
  ["header", "main"].map((part) => words(document, part)).join(" ");

const words = (document: Document, selector: string): string =>
  (document.querySelector(selector)?.textContent ?? "").replace(/\s+/g, " ").trim();

/** Names of all elements in order: what a hostile text would have to change. */
const structure = (text: string): string =>
  Array.from(read(text).querySelectorAll("*"), ({ nodeName }) => nodeName).join(" ");

const CLOSED_SETS = new Set(["verdict", "kind", "precision", "form"]);

/** Every free text of the evidence with `hostile` before it. */
function withText<T>(value: T, hostile: string, key = ""): T {
  if (typeof value === "string") return (CLOSED_SETS.has(key) ? value : hostile + value) as T;
  if (typeof value !== "object" || value === null) return value;
  if (Array.isArray(value)) return value.map((item) => withText(item, hostile, key)) as T;
  const entries = Object.entries(value).map(([field, item]) => [field, withText(item, hostile, field)]);
  return Object.fromEntries(entries) as T;
}

const NO_CORNERS = { runs: 0, exercised: 0, violations: 0 };

const HOSTILE = [
  "<script>alert(1)</script>",
  "</style><script>alert(1)</script>",
  "</title><img src=x onerror=alert(1)>",
  `"><svg onload='alert(1)'>`,
  "'; --",
  "]]><!--",
  "&lt;b&gt;",
  "\u202Ertl \u05D0\u05D1\u05D2 ",
  "\u0000\u0007\ud83d",
  "x".repeat(5000),
];

describe("the report", () => {
  test("states the seed in its first line, and the verdict before the requirements", () => {
    const document = read(renderReport(sampleEvidence(), sampleContext()));
    expect(words(document, "header > :first-child")).toBe(
      "Seed 20240611, 1000 runs per scenario, spoolwright 0.1.0",
    );
    expect(words(document, "main > :first-child .headline")).toBe(
      "1 of 4 requirements violated. Exercised in corner runs only: 1 requirement. " +
        "Not exercised by any random run: 1 of 4 pairs of requirement and scenario.",
    );
  });

  test("shows the worst verdict by shape as well as in words", () => {
    const shapes = (requirements: Evidence["requirements"]): number[] => {
      const document = read(renderReport(sampleEvidence({ requirements })));
      return [".headline.violated .solid", ".headline.holds circle"].map(
        (selector) => document.querySelectorAll(selector).length,
      );
    };
    expect(shapes([sampleResult(), sampleResult(violated)])).toEqual([1, 0]);
    expect(shapes([sampleResult()])).toEqual([0, 1]);
  });

  test("gives margins, runs, violations, bound, line and worst inputs of each requirement", () => {
    const document = read(renderReport(sampleEvidence()));
    const rows = Array.from(document.querySelectorAll("table.requirements tbody tr"), ({ textContent }) =>
      textContent.replace(/\s+/g, " ").trim(),
    );
    expect(rows[2]).toContain("overshoot_small on tip_in");
    expect(rows[2]).toMatch(/holds tested 0\.181 998 of 1000 0 0\.30 % 0 of 64 0\.092 214$/);
    expect(rows[0]).toMatch(/violated tested \u22120\.032 998 of 1000 3 0\.78 % 0 of 64 0\.092 214$/);
    expect(rows[1]).toMatch(/not exercised \u2013 \u2013 0 of 1000 0 \u2013 0 of 64 0\.092 214$/);
    const detail = words(document, "#requirement-1");
    expect(detail).toContain("engine_speed 5931.25 rpm");
    expect(detail).toContain("with a probability below 0.30 %");
    expect(words(document, "#requirement-3")).toContain(
      "spoolwright replay turbo_speed_below_limit-boost_sensor_stuck.counterexample.yaml --spec examples/skarn24/skarn24.yaml",
    );
  });

  test("never calls tested evidence proved or searched", () => {
    const document = read(renderReport(sampleEvidence(), sampleContext()));
    const glossary = words(document, "#assumptions");
    const rest = shown(document).replace(glossary, "");
    expect(rest.match(/proved|searched/g)).toEqual(["proved", "searched"]);
    expect(rest).toContain("Nothing here is proved or searched.");
  });

  test("shows the cautions before the verdict and at the end, also when the evidence brings none", () => {
    for (const cautions of [["Do not trust this blindly."], []]) {
      const document = read(renderReport(sampleEvidence({ cautions })));
      const said = cautions[0] ?? "The plant is a model, not the engine";
      expect(words(document, "header .cautions")).toContain(said);
      expect(words(document, "main > :last-child")).toContain(said);
    }
  });

  test("lists files, hashes, targets that agreed and targets not run, or says that it was not given them", () => {
    const full = words(read(renderReport(sampleEvidence(), sampleContext())), "#code");
    expect(full).toContain("skarn24.c 21 433 ");
    expect(full).toContain("gcc -O2, float32 equal in every bit 1 000 000 0");
    expect(full).toContain("clang -O2, float32 not run: clang is not installed 0 \u2013");
    expect(full).toContain("gcc -O3, float32 differs 1 000 000 3");
    const bare = words(read(renderReport(sampleEvidence())), "#code");
    expect(bare).toContain("it does not show that the C code agrees");
  });

  test("lists every calibration value as written with its line", () => {
    const document = read(renderReport(sampleEvidence(), sampleContext()));
    const calibration = words(document, "#calibration");
    expect(calibration).toContain("target.ceiling 245 kPa abs 41");
    expect(calibration).toContain("feedback.proportional 1481 mm2 60");
    expect(calibration).toContain(
      "target.boost, kPa abs: rows accelerator, ratio; columns engine speed, rpm; line 30",
    );
    expect(calibration).toContain("wastegate_area over opening, line 52");
  });

  test("gives every chart of values a table with the same values", () => {
    const document = read(renderReport(sampleEvidence()));
    const figures = document.querySelectorAll("figure").length;
    expect(figures).toBe(1 + 3 + 2 + 2);
    expect(document.querySelectorAll("figure details table").length).toBe(figures - 1);
    expect(words(document, "#margins-figure figcaption")).toContain("table of requirements above");
  });

  test("shows the worst runs from the lowest margin on, and one of each scenario on the compressor map", () => {
    const traces = [sampleTrace("tip_in", 1), sampleTrace("tip_in", 2, "corner"), sampleTrace("tip_in", 3)];
    const requirements = [0.6, -0.4, 0.5].map((value, trace) =>
      sampleResult({
        id: `r${trace}`,
        worst: { run: trace + 1, margin: value, values: [], trace },
        corners: NO_CORNERS,
      }),
    );
    const document = read(renderReport(sampleEvidence({ traces, requirements })));
    const runs = Array.from(document.querySelectorAll("#runs article"), ({ textContent }) => textContent);
    expect(runs.map((text) => /tip_in\s+(\w+ run \d)/.exec(text)?.[1])).toEqual([
      "corner run 2",
      "random run 3",
      "random run 1",
    ]);
    expect(runs.map((text) => text.includes("on the compressor map"))).toEqual([true, false, false]);
  });

  test("is the same to the byte each time, and fetches nothing", () => {
    const text = renderReport(sampleEvidence(), sampleContext());
    expect(renderReport(sampleEvidence(), sampleContext())).toBe(text);
    const links = Array.from(
      text.matchAll(/\b(?:src|href)="([^"]*)"|url\(([^)]*)\)/g),
      (found) => found[1] ?? found[2],
    );
    expect(links.length).toBeGreaterThan(10);
    expect(links.filter((link) => !link.startsWith("#") && link !== "data:,")).toEqual([]);
    expect(text.replaceAll("http://www.w3.org/2000/svg", "")).not.toMatch(/https?:|@import/);
    expect(text.replace(/<script>.*<\/script>/s, "")).not.toMatch(/plot-clip|\bNaN\b|undefined|\[object/);
  });

  test("escapes every text of the evidence: no text changes the structure of the page", () => {
    const hostile = fc.oneof(fc.constantFrom(...HOSTILE), fc.string({ unit: "binary", maxLength: 40 }));
    const benign = structure(renderReport(sampleEvidence(), sampleContext()));
    fc.assert(
      fc.property(hostile, (text) => {
        const page = renderReport(withText(sampleEvidence(), text), withText(sampleContext(), text));
        expect(structure(page)).toBe(benign);
      }),
      { seed: 20_616, numRuns: 20, examples: HOSTILE.map((text): [string] => [text]) },
    );
  });

  test("prints margins that are no numbers as words", () => {
    const odd = [Number.NaN, Infinity, -Infinity, null as unknown as number].map((value, i) =>
      sampleResult({
        id: `odd_${i}`,
        worst: { run: 1, margin: value, values: [{ name: "x", value, unit: "1" }] },
        margins: {
          quantiles: { least: value, p05: value, median: value, p95: value, most: value },
          histogram: { low: 0, high: 1, counts: [1] },
        },
        violationProbabilityUpper95: value,
      }),
    );
    const document = read(renderReport(sampleEvidence({ requirements: odd })));
    for (const word of ["not a number", "infinite", "minus infinite", "not known"]) {
      expect(words(document, "table.requirements")).toContain(`tested ${word} 998`);
    }
    expect(shown(document)).not.toMatch(/NaN|null|Infinity/);
  });

  test("renders any number of requirements, none among them", () => {
    for (const count of [0, 1, 100]) {
      const requirements = Array.from({ length: count }, (_, i) =>
        sampleResult(i % 7 === 3 ? { ...violated, id: `r${i}` } : { id: `r${i}` }),
      );
      const document = read(renderReport(sampleEvidence({ requirements })));
      expect(document.querySelectorAll("table.requirements tbody tr").length).toBe(Math.max(count, 1));
      expect(document.querySelectorAll("#details article").length).toBe(count);
    }
  });

  test("counts as tested only what some scenario exercised, and names the rest with the reason", () => {
    const {
      worst: _worst,
      margins: _margins,
      ...silent
    } = sampleResult({ verdict: "not_exercised", exercised: 0 });
    const corners = NO_CORNERS;
    const requirements = [
      sampleResult(),
      sampleResult({ id: "partial" }),
      { ...silent, id: "partial", scenario: "boost_sensor_stuck" },
      { ...silent, id: "never", pattern: "stays", corners },
      { ...silent, id: "never", pattern: "stays", corners, scenario: "boost_sensor_stuck" },
    ];
    const document = read(renderReport(sampleEvidence({ requirements })));
    expect(words(document, ".headline.not_exercised")).toBe(
      "No violation found: 2 of 3 requirements tested. Exercised in no scenario, so not tested: 1 requirement. " +
        "Not exercised by any random run: 3 of 5 pairs of requirement and scenario.",
    );
    expect(document.querySelectorAll(".untested li").length).toBe(1);
    expect(words(document, ".untested li")).toMatch(
      /^never was exercised in no scenario: .*`while` was never true/,
    );
    expect(words(document, "table.requirements")).toContain(
      "not exercised \u2013 \u2013 0 of 1000 0 \u2013 0 of 0",
    );
  });

  test("says that nothing was tested when the evidence is empty", () => {
    const { compressorMap: _map, codeFigures: _figures, ...rest } = sampleEvidence();
    const empty: Evidence = {
      ...rest,
      runsPerScenario: 0,
      simulations: 0,
      scenarios: [],
      requirements: [],
      traces: [],
      assumptions: [],
      cautions: [],
    };
    const document = read(renderReport(empty));
    expect(words(document, ".headline")).toBe("Nothing was tested: the evidence holds no requirement.");
    expect(words(document, "#runs")).toContain("no traces");
  });

  test("an evidence in which nothing was exercised claims nothing", () => {
    const {
      worst: _worst,
      margins: _margins,
      ...bare
    } = sampleResult({ verdict: "not_exercised", exercised: 0, corners: NO_CORNERS });
    const document = read(renderReport(sampleEvidence({ requirements: [bare] })));
    expect(words(document, ".headline")).toBe("No requirement was exercised by any run; nothing is known.");
    expect(words(document, "#requirement-1")).toContain(
      "none of 1000 independent random runs exercised it, so they show nothing",
    );
  });
});
