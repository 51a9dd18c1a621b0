import { type Refusal, refusal } from "../front/refusals.ts";
import type { Expression, Place } from "../ir/expression.ts";
import type { FunctionDefinition, Program } from "../ir/program.ts";
import type { Statement } from "../ir/statement.ts";
import { bodiesOf, eachExpression, expressionsOf } from "../ir/walk.ts";

/** How often a path through some code can read and write each exchange field. */
interface Access {
  readonly reads: ReadonlyMap<string, number>;
  readonly writes: ReadonlyMap<string, number>;
}

const NONE: Access = { reads: new Map(), writes: new Map() };

const merged = (
  a: ReadonlyMap<string, number>,
  b: ReadonlyMap<string, number>,
  combine: (one: number, other: number) => number,
): ReadonlyMap<string, number> =>
  new Map(
    [...new Set([...a.keys(), ...b.keys()])].map((key) => [key, combine(a.get(key) ?? 0, b.get(key) ?? 0)]),
  );

const then = (a: Access, b: Access): Access => ({
  reads: merged(a.reads, b.reads, (one, other) => one + other),
  writes: merged(a.writes, b.writes, (one, other) => one + other),
});

const either = (a: Access, b: Access): Access => ({
  reads: merged(a.reads, b.reads, Math.max),
  writes: merged(a.writes, b.writes, Math.max),
});

type Checked = Pick<Program, "functions" | "structs" | "entries">;

const exchangeField = (program: Checked, owner: FunctionDefinition, place: Place): string | undefined => {
  const type = owner.parameters.find(({ name }) => name === place.root)?.type;
  const struct = type?.kind === "struct" ? program.structs.find(({ name }) => name === type.name) : undefined;
  return struct?.role === "exchange" && place.fields.length > 0 ? place.fields.join(".") : undefined;
};

/**
 * Exchange fields are volatile and another task may write them at any moment: along every path of an entry each may be
 * read at most once and written at most once, never inside a loop.
 */
export const checkExchange = (program: Checked): readonly Refusal[] => {
  const accesses = new Map<string, Access>();

  const ofExpression = (owner: FunctionDefinition, root: Expression): Access => {
    let access = NONE;
    eachExpression(root, (each) => {
      if (each.kind === "field") {
        const field = exchangeField(program, owner, each.place);
        access =
          field === undefined ? access : then(access, { reads: new Map([[field, 1]]), writes: new Map() });
      } else if (each.kind === "call") {
        access = then(access, accesses.get(each.function) ?? NONE);
      }
    });
    return access;
  };

  const ofStatement = (owner: FunctionDefinition, statement: Statement): Access => {
    const own = expressionsOf(statement)
      .map((root) => ofExpression(owner, root))
      .reduce(then, NONE);
    const called = statement.kind === "call" ? (accesses.get(statement.call.function) ?? NONE) : NONE;
    const written =
      statement.kind === "assign" && statement.target.kind === "field"
        ? exchangeField(program, owner, statement.target.place)
        : undefined;
    const write: Access =
      written === undefined ? NONE : { reads: new Map(), writes: new Map([[written, 1]]) };
    const bodies = bodiesOf(statement).map((body) => ofBody(owner, body));
    const inside = statement.kind === "for" ? then(bodies[0], bodies[0]) : bodies.reduce(either, NONE);
    return [called, write, inside].reduce(then, own);
  };

  const ofBody = (owner: FunctionDefinition, body: readonly Statement[]): Access =>
    body.map((each) => ofStatement(owner, each)).reduce(then, NONE);

  for (const definition of program.functions) {
    const body = ofBody(definition, definition.body);
    accesses.set(
      definition.name,
      definition.result === undefined ? body : then(body, ofExpression(definition, definition.result)),
    );
  }
  return program.entries.flatMap(({ function: name }) => {
    const { reads, writes } = accesses.get(name) ?? NONE;
    const at = program.functions.find((each) => each.name === name)?.at;
    const report = (counts: ReadonlyMap<string, number>, verb: string): readonly Refusal[] =>
      [...counts]
        .filter(([, count]) => count > 1 && at !== undefined)
        .map(([field]) =>
          refusal(
            "exchange-access",
            at as Refusal["at"],
            `\`${name}\` may ${verb} the exchange's \`${field}\` more than once in one step`,
          ),
        );
    return [...report(reads, "read"), ...report(writes, "write")];
  });
};
