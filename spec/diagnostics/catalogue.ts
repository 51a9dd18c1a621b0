import { ENGINEERING_CODES } from "./catalogue/engineering.ts";
import { QUANTITY_CODES } from "./catalogue/quantities.ts";
import { STRUCTURE_CODES } from "./catalogue/structure.ts";
import { TEXT_CODES } from "./catalogue/text.ts";
import type { Explanation } from "./explanation.ts";

/** Every code the reader can report; codes are stable, texts may improve. */
export const CATALOGUE = {
  ...TEXT_CODES,
  ...STRUCTURE_CODES,
  ...QUANTITY_CODES,
  ...ENGINEERING_CODES,
} as const satisfies Record<string, Explanation>;

export type Code = keyof typeof CATALOGUE;

/** Cause, example and fix of a code; undefined for an unknown one. */
export function explain(code: string): Explanation | undefined {
  return Object.hasOwn(CATALOGUE, code) ? CATALOGUE[code as Code] : undefined;
}
