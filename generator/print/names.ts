import type { Program } from "../ir/program.ts";
import { eachStatement } from "../ir/walk.ts";
import { safeFunctionName, safeName, snakeCase, upperCase } from "./identifiers.ts";

/** Name that the calibration check has in the runtime's style. */
export const CHECK_CALIBRATION = "checkCalibration";

/** Printed names, the same in C and TypeScript. */
export interface Names {
  readonly stem: string;
  readonly struct: (name: string) => string;
  readonly enumeration: (name: string) => string;
  readonly member: (enumeration: string, member: string) => string;
  readonly field: (name: string) => string;
  readonly local: (name: string) => string;
  readonly constant: (name: string) => string;
  readonly function: (name: string) => string;
  readonly calibrationDefault: string;
}

/** Names of parameters and locals anywhere: C tools ask that no function is called the same. */
const localNames = (program: Program): ReadonlySet<string> => {
  const names = new Set<string>();
  for (const { parameters, body } of program.functions) {
    for (const { name } of parameters) {
      names.add(snakeCase(name));
    }
    eachStatement(body, (each) => {
      if (each.kind === "local") {
        names.add(snakeCase(each.name));
      } else if (each.kind === "for") {
        names.add(snakeCase(each.variable));
      }
    });
  }
  return names;
};

const remembered = (change: (name: string) => string): ((name: string) => string) => {
  const known = new Map<string, string>();
  return (name) => {
    const text = known.get(name) ?? change(name);
    known.set(name, text);
    return text;
  };
};

const known = new WeakMap<Program, Names>();

/** Printed names of a program; worked out once, since every part of every file asks. */
export const namesOf = (program: Program): Names => {
  const names = known.get(program) ?? makeNames(program);
  known.set(program, names);
  return names;
};

const makeNames = (program: Program): Names => {
  const stem = program.name;
  const snake = remembered(snakeCase);
  const locals = localNames(program);
  const entries = new Map(
    program.entries.map((entry) => [entry.function, `${stem}_${entry.printed ?? snake(entry.function)}`]),
  );
  const inner = (name: string): string => {
    const plain = safeFunctionName(snake(name));
    return locals.has(plain) ? `compute_${plain}` : plain;
  };
  return {
    stem,
    struct: (name) => `${stem}_${snake(name)}_t`,
    enumeration: (name) => `${stem}_${snake(name)}_t`,
    member: (enumeration, member) => `${upperCase(stem)}_${upperCase(enumeration)}_${upperCase(member)}`,
    field: (name) => safeName(snake(name)),
    local: (name) => safeName(snake(name)),
    constant: upperCase,
    function: (name) => entries.get(name) ?? inner(name),
    calibrationDefault: `${stem}_calibration_default`,
  };
};
