import type { OperatorName } from "../ir/operators.ts";
import type { Program } from "../ir/program.ts";
import { eachExpressionOf } from "../ir/walk.ts";

/** Operators that some function uses, and those that another's helper calls. */
export const usedOperators = (program: Pick<Program, "functions">): ReadonlySet<OperatorName> => {
  const used = new Set<OperatorName>();
  for (const definition of program.functions) {
    eachExpressionOf(definition, (each) => {
      if (each.kind === "operation") {
        used.add(each.operator);
      }
    });
  }
  if (used.has("same")) {
    used.add("isFinite");
  }
  return used;
};

/** Helpers of the operators in use, in the table's order. */
export const helpersFor = (
  used: ReadonlySet<OperatorName>,
  helpers: Partial<Record<OperatorName, readonly string[]>>,
): readonly (readonly string[])[] =>
  Object.entries(helpers).flatMap(([name, lines]) => (used.has(name as OperatorName) ? [lines] : []));
