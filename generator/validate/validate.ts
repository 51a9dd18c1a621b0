import type { Span } from "../../spec/index.ts";
import { type Refusal, refusal } from "../front/refusals.ts";
import type { CallExpression, Place } from "../ir/expression.ts";
import type { FunctionDefinition, Program, Struct } from "../ir/program.ts";
import type { Statement } from "../ir/statement.ts";
import { eachCallOf, eachExpression, eachExpressionOf, eachStatement, expressionsOf } from "../ir/walk.ts";
import { snakeCase } from "../print/identifiers.ts";
import { type Effects, effectsOf, isPure, isPureCall } from "./effects.ts";
import { checkExchange } from "./exchange.ts";

/** Callers above callees only: what C needs for a bounded stack. */
export const findRecursion = (functions: readonly FunctionDefinition[]): readonly Refusal[] => {
  const byName = new Map(functions.map((each) => [each.name, each]));
  const state = new Map<string, "open" | "done">();
  const refusals: Refusal[] = [];
  const visit = (definition: FunctionDefinition): void => {
    state.set(definition.name, "open");
    eachCallOf(definition, (call) => {
      const callee = byName.get(call.function);
      if (state.get(call.function) === "open") {
        refusals.push(
          refusal(
            "recursion",
            call.origin.runtime,
            `\`${call.function}\` calls itself, directly or through others`,
          ),
        );
      } else if (callee !== undefined && !state.has(call.function)) {
        visit(callee);
      }
    });
    state.set(definition.name, "done");
  };
  for (const definition of functions) {
    if (!state.has(definition.name)) {
      visit(definition);
    }
  }
  return refusals;
};

const overlaps = (a: Place, b: Place): boolean =>
  a.root === b.root && a.fields.slice(0, b.fields.length).every((each, i) => each === b.fields[i]);

const placeText = ({ root, fields }: Place): string => [root, ...fields].join(".");

/** Two arguments that are one object, or one inside the other, where the callee writes into either. */
const checkAliases = (
  call: CallExpression,
  callee: FunctionDefinition | undefined,
  effects: Effects,
): readonly Refusal[] => {
  const objects = call.arguments.flatMap((argument, i) =>
    argument.kind === "value"
      ? []
      : [
          {
            place: argument.place,
            written: effects.get(call.function)?.has(callee?.parameters[i].name ?? "") ?? false,
          },
        ],
  );
  return objects.flatMap((one, i) =>
    objects
      .slice(i + 1)
      .filter(
        (other) =>
          (one.written || other.written) &&
          (overlaps(one.place, other.place) || overlaps(other.place, one.place)),
      )
      .map((other) =>
        refusal(
          "same-object-twice",
          call.origin.runtime,
          `\`${placeText(one.place)}\` and \`${placeText(other.place)}\` are one object here`,
        ),
      ),
  );
};

/** The place where a call with effects may stand: the whole right-hand side of a statement, or the whole return. */
const checkEffects = (definition: FunctionDefinition, effects: Effects): readonly Refusal[] => {
  const refusals: Refusal[] = [];
  const inside = (call: CallExpression, at: Span) =>
    refusals.push(
      refusal("effect-in-expression", at, `\`${call.function}\` changes its arguments inside an expression`),
    );
  const checkParts = (root: Parameters<typeof eachExpression>[0], wholeAllowed: boolean) =>
    eachExpression(root, (each) => {
      if (each.kind === "call" && !isPureCall(each, effects) && !(wholeAllowed && each === root)) {
        inside(each, each.origin.runtime);
      }
    });
  eachStatement(definition.body, (statement) => {
    const wholeAllowed = statement.kind === "local" || statement.kind === "assign";
    for (const root of expressionsOf(statement)) {
      const isValue = wholeAllowed && root === (statement as Statement & { kind: "local" | "assign" }).value;
      checkParts(root, isValue);
    }
    if (statement.kind === "assign" && statement.target.kind === "element") {
      const { index } = statement.target;
      const isFixed = index.kind === "count" || index.kind === "local" || index.kind === "constant";
      if (!isFixed && !isPure(statement.value, effects)) {
        refusals.push(
          refusal(
            "unordered-evaluation",
            statement.origin.runtime,
            "the index may be read before or after the call",
          ),
        );
      }
    }
  });
  if (definition.result !== undefined) {
    checkParts(definition.result, true);
  }
  return refusals;
};

/** Arrays that the code uses must have got a length from the spec. */
const checkSizes = (structs: readonly Struct[]): readonly Refusal[] =>
  structs.flatMap(({ name, fields }) =>
    fields
      .filter(({ type }) => type.kind === "array" && !(type.size > 0))
      .map((field) => refusal("missing-size", field.at, `the array \`${name}.${field.name}\` has no length`)),
  );

/** A constant that is infinite or not a number in this precision, written so or folded to it. */
const checkConstants = (definition: FunctionDefinition): readonly Refusal[] => {
  const refusals: Refusal[] = [];
  eachExpressionOf(definition, (each) => {
    if ((each.kind === "real" || each.kind === "constant") && !Number.isFinite(each.value)) {
      refusals.push(
        refusal("infinite-constant", each.origin.runtime, "the constant is not finite in this precision"),
      );
    }
  });
  return refusals;
};

/** Fields that would print under one name. */
const checkFieldNames = ({ name, fields }: Struct): readonly Refusal[] => {
  const printed = fields.map((field) => snakeCase(field.name));
  return fields
    .filter((_, i) => printed.indexOf(printed[i]) !== i)
    .map((field) =>
      refusal("duplicate-name", field.at, `\`${name}.${field.name}\` would print like another field`),
    );
};

/** What must hold for every target to agree and for the code to be safe; `functions` in call order. */
export const validate = (program: Pick<Program, "functions" | "structs" | "entries">): readonly Refusal[] => {
  const effects = effectsOf(program.functions);
  const byName = new Map(program.functions.map((each) => [each.name, each]));
  return [
    ...checkSizes(program.structs),
    ...program.structs.flatMap(checkFieldNames),
    ...program.functions.flatMap((definition) => {
      const aliases: Refusal[] = [];
      eachCallOf(definition, (call) =>
        aliases.push(...checkAliases(call, byName.get(call.function), effects)),
      );
      return [...aliases, ...checkEffects(definition, effects), ...checkConstants(definition)];
    }),
    ...checkExchange(program),
  ];
};
