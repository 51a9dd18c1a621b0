import fc from "fast-check";
import { parseHTML } from "linkedom";
import { describe, expect, test } from "vitest";
import { escapeText, html, name, trusted } from "../../../verification/report/html.ts";

const FORBIDDEN = /[\p{Cc}\p{Surrogate}\p{Noncharacter_Code_Point}]/gu;
const kept = (text: string): string =>
  text.replace(FORBIDDEN, (c) => (c === "\t" || c === "\n" ? c : "\uFFFD"));

describe("html", () => {
  test("any text comes back from a parser as text, inside an element and inside an attribute", () => {
    fc.assert(
      fc.property(fc.string({ unit: "binary", maxLength: 60 }), (text) => {
        const { document } = parseHTML(
          `<!doctype html><body>${html`<p title="${text}">${text}</p>`.markup}</body>`,
        );
        const [paragraph, ...others] = document.querySelectorAll("body *");
        expect(others).toHaveLength(0);
        expect(paragraph.textContent).toBe(kept(text));
        expect(paragraph.getAttribute("title")).toBe(kept(text));
      }),
      { seed: 20_611 },
    );
  });

  test("no markup character survives, and no character that HTML forbids", () => {
    expect(escapeText(`<a b="c" d='e'>&</a>`)).toBe("&lt;a b=&quot;c&quot; d=&#39;e&#39;&gt;&amp;&lt;/a&gt;");
    expect(escapeText("\u0000\u001b[31m\ud800\ufffe\t\n")).toBe("\uFFFD\uFFFD[31m\uFFFD\uFFFD\t\n");
  });

  test("markup made by html or declared trusted is not escaped again, lists are joined, undefined vanishes", () => {
    const items = ["a<", "b"].map((item) => html`<li>${item}</li>`);
    expect(html`<ul>${items}${undefined}${trusted("<hr>")}</ul>`.markup).toBe(
      "<ul><li>a&lt;</li><li>b</li><hr></ul>",
    );
  });

  test("an object from a JSON file cannot pass for markup", () => {
    const forged = JSON.parse('{ "markup": "<script>alert(1)</script>" }');
    expect(() => html`<p>${forged}</p>`).toThrow(TypeError);
  });

  test("a name is isolated, so that its writing direction stays inside", () => {
    expect(name("\u202Eabc").markup).toBe("<bdi>\u202Eabc</bdi>");
  });
});
