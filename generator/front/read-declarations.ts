import type { ts } from "ts-morph";
import { compiler } from "./compiler.ts";
import {
  type Declarations,
  type DeclaredConstant,
  isTableName,
  isValueType,
  type Signature,
  STRUCTURE,
} from "./declarations.ts";
import { isIntrinsic } from "./intrinsics.ts";
import {
  readInterface,
  readStructure,
  readType,
  shortened,
  type TypeNames,
  unionMembers,
} from "./read-types.ts";
import { type Refusal, Refused, refusal } from "./refusals.ts";
import { documentationOf, spanOf } from "./source.ts";

const BASIC_FILE = "types.ts";
const INTRINSICS_FILE = "intrinsics.ts";

const baseName = (file: ts.SourceFile): string => file.fileName.split("/").pop() ?? file.fileName;

const typeNames = (files: readonly ts.SourceFile[]): TypeNames => {
  const { isInterfaceDeclaration, isTypeAliasDeclaration } = compiler();
  const statements = files.flatMap((file) => [...file.statements]);
  return {
    interfaces: new Set(statements.filter(isInterfaceDeclaration).map((each) => each.name.text)),
    enumerations: new Set(
      statements
        .filter(isTypeAliasDeclaration)
        .filter((each) => unionMembers(each.type) !== undefined)
        .map((each) => each.name.text),
    ),
  };
};

const readSignature = (node: ts.FunctionDeclaration, names: TypeNames): Signature => {
  if (node.name === undefined || node.body === undefined || node.typeParameters !== undefined) {
    throw new Refused(
      "unsupported-declaration",
      spanOf(node),
      "a function needs a name and a body, and no type parameters",
    );
  }
  if (
    node.asteriskToken !== undefined ||
    (node.modifiers ?? []).some(({ kind }) => kind === compiler().SyntaxKind.AsyncKeyword)
  ) {
    throw new Refused(
      "unsupported-declaration",
      spanOf(node.name),
      "a step must finish within its period: no `async`, no generators",
    );
  }
  if (node.type === undefined) {
    throw new Refused(
      "missing-type",
      spanOf(node.name),
      `\`${node.name.text}\` does not say what it returns`,
    );
  }
  const returns =
    node.type.kind === compiler().SyntaxKind.VoidKeyword ? undefined : readType(node.type, names);
  if (returns !== undefined && !isValueType(returns)) {
    throw new Refused(
      "struct-as-value",
      spanOf(node.type),
      `\`${node.name.text}\` returns \`${shortened(node.type)}\``,
    );
  }
  return {
    name: node.name.text,
    parameters: node.parameters.map((parameter) => readParameter(parameter, names)),
    ...(returns === undefined ? {} : { returns }),
    node,
    doc: documentationOf(node),
    at: spanOf(node.name),
  };
};

const readParameter = (node: ts.ParameterDeclaration, names: TypeNames): Signature["parameters"][number] => {
  if (!compiler().isIdentifier(node.name) || node.initializer || node.dotDotDotToken || node.questionToken) {
    throw new Refused(
      "unsupported-declaration",
      spanOf(node),
      "a parameter is one name with a type, always passed",
    );
  }
  if (node.type === undefined) {
    throw new Refused("missing-type", spanOf(node), `the parameter \`${node.name.text}\` has no type`);
  }
  return { name: node.name.text, type: readType(node.type, names) };
};

const literalNumber = (node: ts.Expression): number | undefined => {
  const { isNumericLiteral, isPrefixUnaryExpression, SyntaxKind } = compiler();
  if (isNumericLiteral(node)) {
    return Number(node.text);
  }
  if (isPrefixUnaryExpression(node) && node.operator === SyntaxKind.MinusToken) {
    const inner = literalNumber(node.operand);
    return inner === undefined ? undefined : -inner;
  }
  return undefined;
};

const readConstants = (node: ts.VariableStatement, names: TypeNames): readonly DeclaredConstant[] =>
  node.declarationList.declarations.map((each) => {
    const isConst = (node.declarationList.flags & compiler().NodeFlags.Const) !== 0;
    if (!isConst) {
      throw new Refused(
        "unsupported-declaration",
        spanOf(node),
        "a module may hold constants only, no state",
      );
    }
    const type = each.type === undefined ? undefined : readType(each.type, names);
    const value = each.initializer === undefined ? undefined : literalNumber(each.initializer);
    if (type === undefined || value === undefined || (type.kind !== "real" && type.kind !== "count")) {
      throw new Refused(
        "unsupported-declaration",
        spanOf(each),
        "a module constant is `export const NAME: Real = 25`",
      );
    }
    return { name: each.name.getText(), type, value, doc: documentationOf(node), at: spanOf(each.name) };
  });

/** Collects what the files declare. Reports and carries on, so that one run finds many refusals. */
export const readDeclarations = (files: readonly ts.SourceFile[], refusals: Refusal[]): Declarations => {
  const names = typeNames(files);
  const declarations: Declarations = {
    enumerations: new Map(),
    interfaces: new Map(),
    structure: new Map(),
    constants: new Map(),
    functions: new Map(),
  };
  const taken = new Set<string>();
  const claim = (name: string, node: ts.Node): boolean => {
    const free =
      !taken.has(name) && (!isIntrinsic(name) || baseName(node.getSourceFile()) === INTRINSICS_FILE);
    if (!free) {
      refusals.push(refusal("duplicate-name", spanOf(node), `\`${name}\` is declared twice`));
    }
    taken.add(name);
    return free;
  };
  for (const file of files) {
    if (baseName(file) === INTRINSICS_FILE) {
      continue;
    }
    for (const statement of file.statements) {
      try {
        readStatement(statement, file, names, declarations, claim);
      } catch (error) {
        if (!(error instanceof Refused)) {
          throw error;
        }
        refusals.push(error.refusal);
      }
    }
  }
  return declarations;
};

const readStatement = (
  node: ts.Statement,
  file: ts.SourceFile,
  names: TypeNames,
  declarations: Declarations,
  claim: (name: string, node: ts.Node) => boolean,
): void => {
  const { isFunctionDeclaration, isInterfaceDeclaration, isTypeAliasDeclaration, isVariableStatement } =
    compiler();
  const { isImportDeclaration, isExportDeclaration } = compiler();
  if (isInterfaceDeclaration(node)) {
    if (node.name.text === STRUCTURE) {
      readStructure(node, names, declarations);
    } else if (!isTableName(node.name.text) && claim(node.name.text, node.name)) {
      declarations.interfaces.set(node.name.text, readInterface(node, names));
    }
  } else if (isTypeAliasDeclaration(node)) {
    readAlias(node, file, declarations, claim);
  } else if (isVariableStatement(node)) {
    for (const constant of readConstants(node, names)) {
      if (claim(constant.name, node)) {
        declarations.constants.set(constant.name, constant);
      }
    }
  } else if (isFunctionDeclaration(node)) {
    const signature = readSignature(node, names);
    if (claim(signature.name, node.name ?? node)) {
      declarations.functions.set(signature.name, signature);
    }
  } else if (!isImportDeclaration(node) && !isExportDeclaration(node)) {
    throw new Refused(
      "unsupported-declaration",
      spanOf(node),
      `\`${shortened(node)}\` cannot stand in a runtime file`,
    );
  }
};

const readAlias = (
  node: ts.TypeAliasDeclaration,
  file: ts.SourceFile,
  declarations: Declarations,
  claim: (name: string, node: ts.Node) => boolean,
): void => {
  const members = unionMembers(node.type);
  if (members !== undefined && claim(node.name.text, node.name)) {
    declarations.enumerations.set(node.name.text, {
      name: node.name.text,
      members,
      doc: documentationOf(node),
    });
  } else if (members === undefined && baseName(file) !== BASIC_FILE) {
    throw new Refused(
      "unsupported-type",
      spanOf(node),
      `the alias \`${node.name.text}\` is no union of string literals`,
    );
  }
};
