import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import axe, { type AxeResults } from "axe-core";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { renderReport, renderTraceSvg } from "../../verification/report/index.ts";
import { cannotUse } from "../support/tool.ts";
import { sampleContext } from "../verification/report/sample-context.ts";
import {
  sampleEvidence,
  sampleResult,
  sampleTrace,
  violated,
} from "../verification/report/sample-evidence.ts";
import { type Browser, type Page, startChromium } from "./chromium.ts";
import {
  BROKEN_LINKS,
  CLIPPED_LABELS,
  DUPLICATE_IDS,
  LOW_CONTRAST,
  OVERFLOW,
  UNREACHABLE_BOXES,
} from "./page-checks.ts";

const SCHEMES = ["light", "dark"] as const;

interface Watched {
  readonly page: Page;
  /** Console messages, errors and requests other than the file itself. */
  readonly complaints: readonly string[];
}

describe.skipIf(cannotUse("chromium"))("the report in a browser", () => {
  let browser: Browser;
  let folder: string;
  let reports: Readonly<Record<"usual" | "hostile", string>>;

  const write = (file: string, text: string): string => {
    writeFileSync(join(folder, file), text);
    return pathToFileURL(join(folder, file)).href;
  };

  async function open(
    url: string,
    width: number,
    options: Parameters<Browser["newPage"]>[0] = {},
  ): Promise<Watched> {
    const page = await browser.newPage({ viewport: { width, height: 900 }, ...options });
    const complaints: string[] = [];
    page.on("console", (message) => complaints.push(`console: ${message.text()}`));
    page.on("pageerror", (error) => complaints.push(`error: ${error.message}`));
    page.on("request", (request) => {
      if (request.url() !== url && request.url() !== "data:,") complaints.push(`request: ${request.url()}`);
    });
    await page.goto(url);
    return { page, complaints };
  }

  beforeAll(async () => {
    browser = await startChromium();
    folder = mkdtempSync(join(tmpdir(), "spoolwright-report-"));
    const long = "an_unbroken_name_".repeat(20);
    const hostile = sampleEvidence({
      requirements: [
        sampleResult({ ...violated, id: long, says: long, scenario: long, counterexample: `${long}.yaml` }),
        sampleResult({
          id: "<script>document.title='broken'</script>",
          says: "<img src=x onerror=alert(1)>",
        }),
      ],
      cautions: [long],
      assumptions: [long],
    });
    reports = {
      usual: write("usual.html", renderReport(sampleEvidence(), sampleContext())),
      hostile: write("hostile.html", renderReport(hostile, sampleContext())),
    };
  });

  afterAll(async () => {
    await browser?.close();
    rmSync(folder, { recursive: true, force: true });
  });

  test.each(["usual", "hostile"] as const)(
    "%s: nothing is fetched, nothing fails, every link leads somewhere",
    async (kind) => {
      const { page, complaints } = await open(reports[kind], 1280);
      expect(await page.evaluate(BROKEN_LINKS)).toEqual([]);
      expect(await page.evaluate(DUPLICATE_IDS)).toEqual([]);
      expect(await page.title()).toBe("Seed 20240611: evidence for skarn24");
      expect(complaints).toEqual([]);
      await page.close();
    },
  );

  test.each(["usual", "hostile"] as const)(
    "%s: at phone width only boxes of their own scroll sideways",
    async (kind) => {
      const { page } = await open(reports[kind], 360);
      expect(await page.evaluate(OVERFLOW)).toEqual({ page: 0, outside: [] });
      await page.close();
    },
  );

  test.each(SCHEMES)("in %s every text has a contrast of at least 4.5 to 1", async (colorScheme) => {
    const { page } = await open(reports.usual, 1280, { colorScheme });
    const { texts, found } = (await page.evaluate(LOW_CONTRAST)) as { texts: number; found: string[] };
    expect(texts).toBeGreaterThan(300);
    expect(found).toEqual([]);
    const paper = await page.evaluate("getComputedStyle(document.body).backgroundColor");
    expect(paper).toBe(colorScheme === "light" ? "rgb(255, 255, 255)" : "rgb(21, 24, 27)");
    await page.close();
  });

  test("every figure has a table of values or names the one above it, and every box can be reached by keyboard", async () => {
    const { page } = await open(reports.usual, 1280);
    const figures = (await page.evaluate(
      `Array.from(document.querySelectorAll("figure"), (figure) => [
        figure.querySelector("details table tbody tr") !== null,
        figure.querySelector("figcaption").textContent.includes("table of requirements above"),
      ])`,
    )) as [boolean, boolean][];
    expect(figures).toHaveLength(8);
    expect(figures.every(([own, above]) => own || above)).toBe(true);
    expect(await page.evaluate(UNREACHABLE_BOXES)).toBe(0);
    await page.close();
  });

  test.each(SCHEMES)(
    "in %s an independent checker of accessibility finds nothing (axe-core)",
    async (colorScheme) => {
      const { page } = await open(reports.usual, 1280, { colorScheme });
      await page.evaluate(axe.source);
      const { violations, passes } = (await page.evaluate("axe.run()")) as AxeResults;
      expect(
        violations.map(
          ({ id, nodes }) => `${id}: ${nodes.map(({ html }) => html.slice(0, 120)).join(" | ")}`,
        ),
      ).toEqual([]);
      expect(passes.length).toBeGreaterThan(20);
      await page.close();
    },
  );

  test("no label of a chart is cut off", async () => {
    const { page } = await open(reports.usual, 1280);
    expect(await page.evaluate(CLIPPED_LABELS)).toEqual([]);
    await page.close();
  });

  test("without script the page is complete: verdict, tables, drawn lines, and no dead controls", async () => {
    const { page } = await open(reports.usual, 1280, { javaScriptEnabled: false });
    await expect(page.locator(".headline").isVisible()).resolves.toBe(true);
    expect(await page.locator("table.requirements tbody tr").count()).toBe(4);
    expect(await page.locator("#trace-1-figure g[clip-path] path").count()).toBe(9);
    expect(await page.locator("button, input").count()).toBe(0);
    await page.locator("#trace-1-figure summary").click();
    await expect(page.locator("#trace-1-figure table").isVisible()).resolves.toBe(true);
    await page.close();
  });

  test("with script the time axes of a run zoom together and the cursor reads the values", async () => {
    const { page, complaints } = await open(reports.usual, 1280);
    const figure = page.locator("#trace-1-figure");
    const labels = () => figure.locator('g[data-part="x-axis tick label"] text').allTextContents();
    const whole = await labels();
    expect(whole.at(-1)).toBe("4.0");
    await figure.getByRole("button", { name: "zoom in" }).click();
    await figure.getByRole("button", { name: "zoom in" }).click();
    const zoomed = (await labels()).map(Number);
    expect(Math.max(...zoomed) - Math.min(...zoomed)).toBeLessThanOrEqual(1);
    await figure.getByRole("button", { name: "whole run" }).click();
    expect(await labels()).toEqual(whole);
    await figure.locator("input[type=range]").fill("500");
    const read = await figure.locator("output").textContent();
    const trace = sampleEvidence().traces[0].signals.boost_pressure?.[200] ?? Number.NaN;
    expect(Number(read?.match(/^2\.000 s: .*\bboost ([\d.]+)/)?.[1])).toBeCloseTo(trace, 0);
    expect(complaints).toEqual([]);
    await page.close();
  });

  test("a run's SVG file is well-formed, whatever its title holds, and stands in light colours in a dark browser", async () => {
    const { signals, mode, stepS } = sampleTrace("tip_in", 1);
    const title = `<b>"&nbsp;' \u0000\u00a0]]> --> \u202E`;
    const svg = renderTraceSvg({ id: "run", title, stepS, length: 401, signals, mode });
    const { page, complaints } = await open(write("run.svg", svg), 800, { colorScheme: "dark" });
    expect(await page.evaluate("document.documentElement.nodeName")).toBe("svg");
    expect(await page.evaluate("document.querySelectorAll('parsererror').length")).toBe(0);
    expect(await page.evaluate("getComputedStyle(document.querySelector('text')).fill")).toBe(
      "rgb(27, 31, 35)",
    );
    expect(complaints).toEqual([]);
    await page.close();
  });

  test("prints on A4 without cutting anything off at the right", async () => {
    const { page } = await open(reports.usual, 692, { colorScheme: "dark" });
    await page.emulateMedia({ media: "print" });
    expect(
      await page.evaluate(`Array.from(document.querySelectorAll("main *"))
      .filter((element) => element.getBoundingClientRect().right > innerWidth + 0.5).map((element) => element.outerHTML.slice(0, 80))`),
    ).toEqual([]);
    expect(await page.evaluate("getComputedStyle(document.body).backgroundColor")).toBe("rgb(255, 255, 255)");
    const pdf = await page.pdf({ preferCSSPageSize: true });
    expect(pdf.subarray(0, 5).toString()).toBe("%PDF-");
    await page.close();
  });
});
