import { parse } from "yaml";
import { type Diagnostic, type LoopSpec, readLoopSpec, type Source, type Span } from "../spec/index.ts";
import { placeInSpec, setInSpec } from "../verification/index.ts";
import { CommandFailure } from "./command-failure.ts";
import type { Loaded } from "./load-loop.ts";
import { loadSource, neighboursOf } from "./load-source.ts";

/** The place of what was written on the command line: each setting is one line of this text. */
const COMMAND_LINE = "--set";

function pathOf(setting: string): string {
  const at = setting.indexOf("=");
  if (at < 1) throw new CommandFailure(`--set needs path=value, got ${JSON.stringify(setting)}`);
  return setting.slice(0, at).trim();
}

function applySetting(text: string, setting: string): string {
  const path = pathOf(setting);
  try {
    return setInSpec(text, path, parse(setting.slice(setting.indexOf("=") + 1)));
  } catch (error) {
    throw new CommandFailure(`--set ${setting}: ${error instanceof Error ? error.message : String(error)}`);
  }
}

/** The offset before an edit of the one stretch in which two texts differ; its start for an offset inside. */
function offsetBefore(before: string, after: string, offset: number): number {
  const shorter = Math.min(before.length, after.length);
  let head = 0;
  while (head < shorter && before[head] === after[head]) head++;
  if (offset <= head) return offset;
  let tail = 0;
  while (tail < shorter - head && before.at(-1 - tail) === after.at(-1 - tail)) tail++;
  return offset >= after.length - tail ? offset - after.length + before.length : head;
}

function offsetOf(text: string, line: number, column: number): number {
  const start = text.split("\n", line - 1).reduce((sum, each) => sum + each.length + 1, 0);
  return start + column - 1;
}

function positionOf(text: string, offset: number): { readonly line: number; readonly column: number } {
  const lines = text.slice(0, offset).split("\n");
  return { line: lines.length, column: lines[lines.length - 1].length + 1 };
}

/** Moves places in the changed text to where their reader can look them up: the file on disk, or the command line. */
function relocator(file: string, texts: readonly string[], settings: readonly string[]): (at: Span) => Span {
  const changed = texts[texts.length - 1];
  const written = settings.map((setting) => placeInSpec(changed, pathOf(setting)));
  const before = (offset: number): number =>
    texts.reduceRight((at, text, k) => (k === 0 ? at : offsetBefore(texts[k - 1], text, at)), offset);
  return (at) => {
    if (at.file !== file) return at;
    const start = offsetOf(changed, at.line, at.column);
    const end = offsetOf(changed, at.endLine, at.endColumn);
    const index = written.findLastIndex((place) => place && place[0] <= start && start < place[1]);
    if (index >= 0) {
      const line = index + 1;
      return { file: COMMAND_LINE, line, column: 1, endLine: line, endColumn: settings[index].length + 1 };
    }
    const [from, to] = [positionOf(texts[0], before(start)), positionOf(texts[0], before(end))];
    return { file, line: from.line, column: from.column, endLine: to.line, endColumn: to.column };
  };
}

const relocated = (found: Diagnostic, move: (at: Span) => Span): Diagnostic => ({
  ...found,
  at: move(found.at),
  ...(found.because && { because: found.because.map((other) => ({ ...other, at: move(other.at) })) }),
});

/** The spec as it reads with the settings written into its text; findings about a setting point at the command line. */
export function loadWithSettings(path: string, settings: readonly string[]): Loaded<LoopSpec> {
  const { source, diagnostics } = loadSource(path);
  if (source === undefined) return { diagnostics, sources: [] };
  const texts = [source.text];
  for (const setting of settings) texts.push(applySetting(texts[texts.length - 1], setting));
  const neighbours = neighboursOf(path);
  const { spec, diagnostics: found } = readLoopSpec(
    { ...source, text: texts[texts.length - 1] },
    neighbours.open,
  );
  const move = settings.length > 0 ? relocator(source.file, texts, settings) : (at: Span) => at;
  const commandLine: Source = {
    file: COMMAND_LINE,
    text: settings.map((each) => each.replaceAll("\n", " ")).join("\n"),
  };
  return {
    ...(spec === undefined ? {} : { value: spec }),
    diagnostics: [...found.map((each) => relocated(each, move)), ...neighbours.diagnostics],
    sources: [source, ...neighbours.sources, commandLine],
  };
}
