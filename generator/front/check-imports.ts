import type { ts } from "ts-morph";
import { compiler } from "./compiler.ts";
import { type Refusal, refusal } from "./refusals.ts";
import { spanOf } from "./source.ts";

const exportedNames = (file: ts.SourceFile): ReadonlySet<string> => {
  const { isVariableStatement, isFunctionDeclaration, isInterfaceDeclaration, isTypeAliasDeclaration } =
    compiler();
  return new Set(
    file.statements.flatMap((node) => {
      if (isVariableStatement(node)) {
        return node.declarationList.declarations.map((each) => each.name.getText());
      }
      const named =
        isFunctionDeclaration(node) || isInterfaceDeclaration(node) || isTypeAliasDeclaration(node);
      return named && node.name !== undefined ? [node.name.text] : [];
    }),
  );
};

const importedElements = (node: ts.ImportDeclaration): readonly ts.ImportSpecifier[] | undefined => {
  const bindings = node.importClause?.namedBindings;
  const plain = node.importClause?.name === undefined && bindings !== undefined;
  return plain && compiler().isNamedImports(bindings) ? bindings.elements : undefined;
};

/** Imports are followed by name: each must be declared in the file it is imported from, under the same name. */
export const checkImports = (files: readonly ts.SourceFile[]): readonly Refusal[] => {
  const byName = new Map(files.map((file) => [file.fileName.split("/").pop(), file]));
  const check = (node: ts.ImportDeclaration): readonly Refusal[] => {
    const from = node.moduleSpecifier.getText().slice(1, -1);
    const target = from.startsWith("./") ? byName.get(from.slice(2)) : undefined;
    if (target === undefined) {
      return [
        refusal("outside-import", spanOf(node.moduleSpecifier), `\`${from}\` is no file of the runtime`),
      ];
    }
    const elements = importedElements(node);
    if (elements === undefined) {
      return [
        refusal(
          "outside-import",
          spanOf(node),
          'import names one by one: `import { clamp } from "./intrinsics.ts"`',
        ),
      ];
    }
    const known = exportedNames(target);
    return elements
      .filter((each) => each.propertyName !== undefined || !known.has(each.name.text))
      .map((each) =>
        refusal("unknown-name", spanOf(each), `\`${each.getText()}\` is not declared in \`${from}\``),
      );
  };
  return files.flatMap((file) => file.statements.filter(compiler().isImportDeclaration).flatMap(check));
};
