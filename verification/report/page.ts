import { createHash } from "node:crypto";
import { type Html, html, trusted } from "./html.ts";
import { PAGE_SCRIPT } from "./page-script.ts";
import { PAGE_STYLE } from "./page-style.ts";

/** Nothing is fetched, and no script but the page's own can run, whatever a name in the evidence holds. */
function policy(): string {
  const hash = createHash("sha256").update(PAGE_SCRIPT).digest("base64");
  return (
    `default-src 'none'; style-src 'unsafe-inline'; img-src data:; script-src 'sha256-${hash}'; ` +
    "base-uri 'none'; form-action 'none'"
  );
}

/** One self-contained page; `body` stands in it as it is. */
export function page(title: string, body: Html): string {
  const head = html`<meta charset="utf-8">
<meta http-equiv="Content-Security-Policy" content="${policy()}">
<meta name="viewport" content="width=device-width, initial-scale=1">
<meta name="color-scheme" content="light dark">
<link rel="icon" href="data:,">
<title>${title}</title>
<style>${trusted(PAGE_STYLE)}</style>`;
  return `<!doctype html>
<html lang="en">
<head>
${head.markup}
</head>
<body>
${body.markup}
<script>${PAGE_SCRIPT}</script>
</body>
</html>
`;
}
