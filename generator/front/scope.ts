import type { ts } from "ts-morph";
import type { Origin, ValueType } from "../ir/expression.ts";
import type { Declarations, DeclaredType, Signature } from "./declarations.ts";
import { isIntrinsic } from "./intrinsics.ts";
import { type Refusal, Refused } from "./refusals.ts";
import { spanOf } from "./source.ts";

export interface LocalName {
  readonly type: ValueType;
  readonly mutable: boolean;
}

/** Everything an expression of one function can refer to. */
export interface Scope {
  readonly declarations: Declarations;
  readonly signature: Signature;
  readonly parameters: ReadonlyMap<string, DeclaredType>;
  /** Innermost last. */
  readonly blocks: readonly Map<string, LocalName>[];
  readonly refusals: Refusal[];
}

export const inner = (scope: Scope): Scope => ({ ...scope, blocks: [...scope.blocks, new Map()] });

export const findLocal = (scope: Scope, name: string): LocalName | undefined =>
  scope.blocks.map((block) => block.get(name)).find((found) => found !== undefined);

/** Declares a local; a name already visible in this function is refused. */
export const declareLocal = (scope: Scope, name: string, local: LocalName, node: ts.Node): void => {
  const taken = findLocal(scope, name) !== undefined || scope.parameters.has(name);
  scope.blocks[scope.blocks.length - 1].set(name, local);
  if (taken || scope.declarations.constants.has(name) || isIntrinsic(name)) {
    throw new Refused("shadowed-name", spanOf(node), `\`${name}\` already means something else here`);
  }
};

export const originOf = (node: ts.Node): Origin => ({ runtime: spanOf(node) });
