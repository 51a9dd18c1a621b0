import { createRequire } from "node:module";
import type { ts } from "ts-morph";

let loaded: typeof ts | undefined;

/** The TypeScript parser inside ts-morph, loaded on first use: it takes 0.2 s, which `check` does not need to spend. */
export const compiler = (): typeof ts => {
  loaded ??= (createRequire(import.meta.url)("ts-morph") as typeof import("ts-morph")).ts;
  return loaded;
};
