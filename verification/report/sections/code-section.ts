import type { Evidence } from "../../evidence.ts";
import { tableBox } from "../figure.ts";
import { code, type Html, html, name } from "../html.ts";
import { figure, whole } from "../numbers.ts";
import type { Agreement, GeneratedFile, ReportContext } from "../report-context.ts";

function filesTable(files: readonly GeneratedFile[]): Html {
  return tableBox(
    {
      caption: "Generated files",
      head: ["file", "bytes", "SHA-256"],
      rows: files.map((file) => [
        code(file.path),
        whole(file.bytes),
        html`<code class="hash">${file.sha256}</code>`,
      ]),
    },
    "files",
  );
}

function agreementTable({ targets, notRun }: Agreement): Html {
  const compared = targets.map((target) => [
    name(target.name),
    target.differing === 0 ? "equal in every bit" : "differs",
    whole(target.steps),
    whole(target.differing),
  ]);
  const missing = notRun.map((target) => [
    name(target.name),
    html`not run: ${name(target.why)}`,
    "0",
    "\u2013",
  ]);
  return tableBox(
    {
      caption: "Forms of the controller stepped side by side with the same inputs",
      head: ["form", "result", "steps compared", "steps that differ"],
      rows: [...compared, ...missing],
    },
    "agreement",
  );
}

function figuresTable(evidence: Evidence): Html | undefined {
  if (evidence.codeFigures === undefined) return undefined;
  const rows = evidence.codeFigures.map(({ name: label, value, unit }) => [
    name(label),
    typeof value === "number" ? figure(value, 6) : name(value),
    name(unit),
  ]);
  return tableBox(
    { caption: "Figures of the generated code", head: ["figure", "value", "unit"], rows },
    "figures",
  );
}

/** What was generated, and which forms of it agreed. */
export function codeSection(evidence: Evidence, context: ReportContext): Html {
  const { controller } = evidence;
  return html`<section id="code" aria-labelledby="code-title">
<h2 id="code-title">Generated code</h2>
<p>Controller ${name(controller.name)}, ${controller.precision}, step ${figure(controller.stepS * 1000)} ms, guard step
${figure(controller.guardStepS * 1000)} ms. The runs of this report used the ${
    controller.form === "runtime" ? "runtime itself (not the generated code)" : "generated TypeScript"
  }.</p>
${figuresTable(evidence)}
${context.files === undefined ? html`<p>No list of generated files was given to this report.</p>` : filesTable(context.files)}
${
  context.agreement === undefined
    ? html`<p>No comparison of targets was given to this report: it does not show that the C code agrees.</p>`
    : agreementTable(context.agreement)
}
</section>`;
}
