import pico from "picocolors";
import type { Diagnostic, Severity } from "../diagnostic.ts";
import { counted } from "../read/suggest.ts";
import type { Span } from "../span.ts";
import type { Source } from "../text/source.ts";
import { sourceLine, visible } from "./source-line.ts";
import { wrap } from "./wrap.ts";

export interface RenderOptions {
  readonly colour: boolean;
  /** Columns of the terminal; 80 when there is none. */
  readonly width: number;
  /** What was not done because of the errors, for the last line: `nothing was written`. */
  readonly consequence?: string;
}

type Paint = ReturnType<typeof pico.createColors>;

interface Sheet {
  readonly paint: Paint;
  readonly width: number;
  readonly lines: ReadonlyMap<string, readonly string[]>;
}

const place = (at: Span): string => `${at.file}:${at.line}:${at.column}:`;

/** Diagnostics as text for people: place, severity, sentence, code; the source line; the other place; the fix; a count. */
export function renderDiagnostics(
  diagnostics: readonly Diagnostic[],
  sources: readonly Source[],
  options: RenderOptions,
): string {
  if (diagnostics.length === 0) return "";
  const lines = new Map(sources.map(({ file, text }) => [file, text.replace(/^\uFEFF/, "").split("\n")]));
  const sheet = { paint: pico.createColors(options.colour), width: options.width, lines };
  const all = diagnostics.map((each) => renderOne(each, sheet));
  return `${all.join("\n\n")}\n\n${summary(diagnostics, options)}\n`;
}

function renderOne(diagnostic: Diagnostic, sheet: Sheet): string {
  const { paint, width } = sheet;
  const { at, severity, message, code, label = "", because = [], fix } = diagnostic;
  const start = `${place(at)} ${severity}:`;
  const sentence = wrap(`${visible(message)} (${code})`, width, start.length + 1, "    ");
  const parts = [
    `${paint.bold(place(at))} ${colourOf(severity, paint)(`${severity}:`)} ${paint.bold(sentence)}`,
    ...excerpt(at, label, severity, sheet),
    ...because.map((other) => renderOther(other, sheet)),
    ...(fix === undefined ? [] : [`  ${paint.green("fix:")} ${visible(fix)}`]),
  ];
  return parts.join("\n");
}

function excerpt(at: Span, label: string, severity: Severity, { paint, width, lines }: Sheet): string[] {
  const file = lines.get(at.file);
  if (file === undefined || file[at.line - 1] === undefined)
    return label === "" ? [] : [`      ${visible(label)}`];
  const { text, caret } = sourceLine(file, at, width);
  if (text.trim() === "" && label === "") return [];
  const room = " ".repeat(caret);
  const says = label === "" ? "" : ` ${wrapLabel(visible(label), caret, width)}`;
  return [text, `${room}${colourOf(severity, paint)(`^${says}`)}`];
}

/** A label far to the right keeps its words on one line rather than in a narrow column. */
function wrapLabel(label: string, caret: number, width: number): string {
  const indent = " ".repeat(caret + 2);
  return width - indent.length < 30 ? label : wrap(label, width, indent.length, indent);
}

function renderOther(other: NonNullable<Diagnostic["because"]>[number], { paint, width }: Sheet): string {
  const start = `  because ${place(other.at)}`;
  return `${paint.dim(start)} ${wrap(visible(other.message), width, start.length + 1, "    ")}`;
}

function colourOf(severity: Severity, paint: Paint): (text: string) => string {
  if (severity === "error") return paint.red;
  return severity === "warning" ? paint.yellow : paint.cyan;
}

function summary(diagnostics: readonly Diagnostic[], { consequence }: RenderOptions): string {
  const counts = (["error", "warning", "hint"] as const)
    .map((severity) => ({ severity, count: diagnostics.filter((each) => each.severity === severity).length }))
    .filter(({ count }) => count > 0);
  const files = new Set(diagnostics.map(({ at }) => at.file)).size;
  const says = `${counts.map(({ severity, count }) => counted(count, severity)).join(", ")} in ${counted(files, "file")}`;
  const stopped = counts[0]?.severity === "error" && consequence !== undefined ? `; ${consequence}` : "";
  return `${says}${stopped}. \`spoolwright explain ${diagnostics[0].code}\` says more.`;
}
