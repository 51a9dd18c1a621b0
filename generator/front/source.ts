import type { ts } from "ts-morph";
import type { Span } from "../../spec/index.ts";
import { compiler } from "./compiler.ts";
import { type Refusal, refusal } from "./refusals.ts";

export const parseSource = (fileName: string, text: string): ts.SourceFile =>
  compiler().createSourceFile(fileName, text, compiler().ScriptTarget.ES2022, true);

const spanBetween = (file: ts.SourceFile, start: number, end: number): Span => {
  const from = file.getLineAndCharacterOfPosition(start);
  const to = file.getLineAndCharacterOfPosition(end);
  return {
    file: file.fileName,
    line: from.line + 1,
    column: from.character + 1,
    endLine: to.line + 1,
    endColumn: to.character + 1,
  };
};

export const spanOf = (node: ts.Node): Span => {
  const file = node.getSourceFile();
  return spanBetween(file, node.getStart(file), node.getEnd());
};

interface WithParseErrors {
  readonly parseDiagnostics?: readonly ts.DiagnosticWithLocation[];
}

export const syntaxErrors = (file: ts.SourceFile): readonly Refusal[] =>
  ((file as WithParseErrors).parseDiagnostics ?? []).map((each) =>
    refusal(
      "syntax-error",
      spanBetween(file, each.start, each.start + each.length),
      compiler().flattenDiagnosticMessageText(each.messageText, " ").replace(/\.$/, ""),
    ),
  );

const stripped = (comment: string): readonly string[] => {
  const inner = comment.startsWith("//")
    ? comment.slice(2)
    : comment.replace(/^\/\*+/, "").replace(/\*+\/$/, "");
  return inner.split(/\r?\n/).map((line, i) => {
    const bare = i === 0 ? line : line.replace(/^\s*\*/, "");
    return bare.replace(/^ /, "").trimEnd();
  });
};

const withoutEmptyEnds = (lines: readonly string[]): readonly string[] => {
  const full = lines.map((line, i) => (line.trim() === "" ? -1 : i)).filter((i) => i >= 0);
  return full.length === 0 ? [] : lines.slice(full[0], full[full.length - 1] + 1);
};

/** Sentences written above a node, without comment marks; indents of equations are kept. */
export const commentsAbove = (node: ts.Node): readonly string[] => {
  const text = node.getSourceFile().text;
  const ranges = compiler().getLeadingCommentRanges(text, node.getFullStart()) ?? [];
  return withoutEmptyEnds(ranges.flatMap((range) => stripped(text.slice(range.pos, range.end))));
};

/** As `commentsAbove`, of the documentation comment that is nearest: a file's head is not its first function's. */
export const documentationOf = (node: ts.Node): readonly string[] => {
  const text = node.getSourceFile().text;
  const ranges = compiler().getLeadingCommentRanges(text, node.getFullStart()) ?? [];
  const nearest = ranges.filter((range) => text.startsWith("/**", range.pos)).pop();
  return nearest === undefined ? [] : withoutEmptyEnds(stripped(text.slice(nearest.pos, nearest.end)));
};
