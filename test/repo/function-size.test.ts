import { Node, Project } from "ts-morph";
import { expect, test } from "vitest";
import { FOLDERS, sourcesUnder, textOf } from "./repository.ts";

/** A function with a name of its own: declared, a method, or an arrow that a constant holds. Callbacks do not count. */
function isNamed(node: Node): boolean {
  if (Node.isFunctionDeclaration(node) || Node.isMethodDeclaration(node)) return true;
  return Node.isArrowFunction(node) && Node.isVariableDeclaration(node.getParent());
}

/** Lines of every named function. */
function functionSizes(): number[] {
  const project = new Project({ useInMemoryFileSystem: true, skipLoadingLibFiles: true });
  return FOLDERS.flatMap(sourcesUnder).flatMap((path) =>
    project
      .createSourceFile(path, textOf(path))
      .getDescendants()
      .filter(isNamed)
      .map((one) => one.getEndLineNumber() - one.getStartLineNumber() + 1),
  );
}

const sizes = functionSizes().sort((a, b) => a - b);
const quantile = (ratio: number): number => sizes[Math.floor(ratio * (sizes.length - 1))];

test("functions are short: half have at most 9 lines, nine in ten at most 30", () => {
  expect(sizes.length).toBeGreaterThan(20);
  expect(quantile(0.5)).toBeLessThanOrEqual(9);
  expect(quantile(0.9)).toBeLessThanOrEqual(30);
});
