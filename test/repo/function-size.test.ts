import { Project, SyntaxKind } from "ts-morph";
import { expect, test } from "vitest";
import { FOLDERS, sourcesUnder, textOf } from "./repository.ts";

const KINDS = [SyntaxKind.FunctionDeclaration, SyntaxKind.ArrowFunction, SyntaxKind.MethodDeclaration];

/** Lines of every function that has a body of statements; one-line arrows would only flatter the figures. */
function functionSizes(): { readonly where: string; readonly lines: number }[] {
  const project = new Project({ useInMemoryFileSystem: true, skipLoadingLibFiles: true });
  return FOLDERS.flatMap(sourcesUnder).flatMap((path) => {
    const file = project.createSourceFile(path, textOf(path));
    return KINDS.flatMap((kind) => file.getDescendantsOfKind(kind)).flatMap((one) => {
      if (one.getFirstChildByKind(SyntaxKind.Block) === undefined) return [];
      const first = one.getStartLineNumber();
      return [{ where: `${path}:${first}`, lines: one.getEndLineNumber() - first + 1 }];
    });
  });
}

const sizes = functionSizes().sort((a, b) => a.lines - b.lines);
const quantile = (ratio: number): number => sizes[Math.floor(ratio * (sizes.length - 1))].lines;

test("functions are short: half have at most 9 lines, nine in ten at most 30", () => {
  expect({ median: quantile(0.5) <= 9, p90: quantile(0.9) <= 30, seen: sizes.length > 20 }).toEqual({
    median: true,
    p90: true,
    seen: true,
  });
});
