import type { Diagnostic, Span } from "../../spec/index.ts";

/** Why each construct is outside the language, and the way round it. The set is closed: a refusal has one of these codes. */
export const REFUSALS = {
  "syntax-error": "the file does not parse; fix the syntax first",
  "unsupported-loop":
    "a step's length must be known before it runs; use `for (let i = 0; i < 4; i++)` with a literal, a constant or an array's length",
  "unsupported-statement":
    "only const, let, assignment, if, switch over an enumeration, for, calls and one return can be compiled",
  "unsupported-expression":
    "only arithmetic, comparison, selection, fields, elements and calls can be compiled",
  "unsupported-declaration":
    "a file may hold imports, types, interfaces, constants and functions; move anything else out of the runtime",
  "unsupported-type":
    "write `Real`, `Count`, `Flag`, a named union of string literals, an interface of these, or `readonly Real[]`",
  "unsupported-operator": "write it with + - * / < <= > >= === !== && || ! and `c ? a : b`",
  "compound-assignment": "write `x = x + y`, so that the order of rounding is on the page",
  "real-equality":
    "equality of reals is a trap with NaN and rounding; use `same(a, b)`, or compare with < and >",
  "division-of-counts": "whole-number division differs between languages; convert with `toReal` first",
  "mixed-types": "convert with `toReal(count)` or `toCount(real, low, high)`",
  "wrong-type": "make both sides the same type",
  "untyped-literal": "write its type: `const x: Real = 0`",
  "whole-number": "a `Count` is a whole number of 32 bits",
  "infinite-constant": "a constant is finite in the controller's precision; use a smaller number",
  "unknown-name": "declare it, or import it from another runtime file",
  "outside-import": "the runtime imports nothing from outside itself; copy what is needed into it",
  "duplicate-name": "every function, type and constant of the runtime has a name of its own; rename one",
  "shadowed-name": "give the inner name another one: C tools and readers confuse the two",
  "missing-type": "write the type: the generator reads annotations only",
  "early-return": "one `return`, as the last statement; keep the value in a local until then",
  "assigned-parameter": "copy the parameter into a local and change that",
  "assigned-constant": "declare it with `let` and its type",
  "read-only-field": "take `readonly` off the field, or write to another one",
  "struct-as-value": "structs are passed to functions whole and never copied; name one of its fields",
  "wrong-arguments": "pass what the function declares, in its order",
  "literal-bounds": "the bounds of `toCount` are whole literals within +-16777216, low first",
  recursion: "a controller's stack must be bounded; write the steps out or use a `for` loop",
  "same-object-twice": "two names for one object make reads and writes depend on each other; pass it once",
  "effect-in-expression": "a call that changes its arguments must stand alone: give its result a name first",
  "exchange-access":
    "another task may write it in between: read it once per step into a local, and write it once",
  "missing-size": "the spec gives no length for this array",
  "missing-entry": "the runtime lacks a function that the spec's tasks need",
  "structure-argument": "pass the structure on as it is",
  "structure-value": "the spec does not fix this choice",
  "unordered-evaluation":
    "the index is read before or after the call, depending on the compiler; take it into a local first",
} as const;

export type RefusalCode = keyof typeof REFUSALS;

export type Refusal = Diagnostic & { readonly code: RefusalCode };

export const refusal = (code: RefusalCode, at: Span, message: string): Refusal => ({
  code,
  severity: "error",
  at,
  message,
  fix: REFUSALS[code],
});

/** Leaves the statement at hand; caught at the next statement, so that one run finds many refusals. */
export class Refused extends Error {
  readonly refusal: Refusal;
  constructor(code: RefusalCode, at: Span, message: string) {
    super(message);
    this.refusal = refusal(code, at, message);
  }
}
