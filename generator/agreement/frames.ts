import type { ValueType } from "../ir/expression.ts";
import type { Layout } from "../layout/layout.ts";
import { leavesOf } from "../layout/leaves.ts";
import type { Naming } from "../layout/objects.ts";

// Frames are rows of words. A word is as wide as a real of the controller (4 or 8 bytes, little endian); counts, flags
// and members are whole numbers of that width. Every target writes the same words for the same data.

/** One word of a frame: which value of which object. */
export interface Word {
  readonly struct: string;
  readonly path: { readonly [naming in Naming]: readonly string[] };
  /** For a value of an array. */
  readonly element?: number;
  readonly type: ValueType;
}

const wordsOf = (layout: Layout, struct: string): readonly Word[] =>
  leavesOf(layout, struct).flatMap(({ runtime, printed, type }): readonly Word[] => {
    const path = { runtime, printed };
    return type.kind === "array"
      ? Array.from({ length: type.size }, (_, element) => ({
          struct,
          path,
          element,
          type: { kind: "real" } as const,
        }))
      : [{ struct, path, type }];
  });

export interface FrameLayout {
  /** Sent once, before the first step. */
  readonly calibration: readonly Word[];
  /** Sent before each step, after the word that says which steps to run. */
  readonly input: readonly Word[];
  /** Written after initialisation and after each frame: every output, state and exchange field. */
  readonly dump: readonly Word[];
  readonly wordBytes: 4 | 8;
}

/** Bits of a frame's first word. */
export const RUN_FAST = 1;
export const RUN_SLOW = 2;

export const frameLayout = (layout: Layout): FrameLayout => {
  const outer = layout.structs.filter((struct) => struct.outer);
  const words = (roles: readonly string[]) =>
    outer.filter(({ role }) => roles.includes(role)).flatMap(({ name }) => wordsOf(layout, name));
  return {
    calibration: words(["calibration"]),
    input: words(["input"]),
    dump: words(["output", "state", "exchange"]),
    wordBytes: layout.precision === "float32" ? 4 : 8,
  };
};
