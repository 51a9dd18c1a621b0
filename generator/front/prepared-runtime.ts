import { createHash } from "node:crypto";
import { type RuntimeModule, readRuntime } from "./read-runtime.ts";
import type { Refusal } from "./refusals.ts";

// Parsing the runtime needs the TypeScript compiler, whose loading alone takes longer than all other passes together.
// The package therefore carries the parsed form beside the text; it counts only while it belongs to that very text.

export interface ReadRuntime {
  readonly module: RuntimeModule;
  readonly refusals: readonly Refusal[];
}

const hashOf = (runtime: ReadonlyMap<string, string>): string => {
  const hash = createHash("sha256");
  for (const [name, text] of runtime) {
    hash.update(`${name}\0${text}\0`);
  }
  return hash.digest("hex");
};

/** JSON has no maps, no -0 and no infinities. */
const pack = (_: string, value: unknown): unknown => {
  if (value instanceof Map) {
    return { $map: [...value] };
  }
  const isOdd = typeof value === "number" && (Object.is(value, -0) || !Number.isFinite(value));
  return isOdd ? { $number: Object.is(value, -0) ? "-0" : String(value) } : value;
};

const unpack = (_: string, value: unknown): unknown => {
  if (typeof value !== "object" || value === null) {
    return value;
  }
  const { $map, $number } = value as { readonly $map?: [string, unknown][]; readonly $number?: string };
  return $map !== undefined ? new Map($map) : $number !== undefined ? Number($number) : value;
};

const remembered = new WeakMap<ReadonlyMap<string, string>, ReadRuntime>();

/** The runtime parsed: once per map, since it is the same for every spec. The map must not change afterwards. */
export const parsedRuntime = (runtime: ReadonlyMap<string, string>): ReadRuntime => {
  const known = remembered.get(runtime) ?? readRuntime(runtime);
  remembered.set(runtime, known);
  return known;
};

/** The parsed form of a runtime as text, for `useParsedRuntime`. */
export const packRuntime = (runtime: ReadonlyMap<string, string>): string =>
  JSON.stringify({ of: hashOf(runtime), ...parsedRuntime(runtime) }, pack);

/** Takes the parsed form from `packRuntime` instead of parsing; false, and no effect, if it belongs to another text. */
export const useParsedRuntime = (runtime: ReadonlyMap<string, string>, packed: string): boolean => {
  const { of, module, refusals } = JSON.parse(packed, unpack) as ReadRuntime & { readonly of: string };
  const fits = of === hashOf(runtime);
  if (fits) {
    remembered.set(runtime, { module, refusals });
  }
  return fits;
};
