import type { Explanation } from "../explanation.ts";

/** Rules of the trade that need no plant. */
export const ENGINEERING_CODES = {
  "step-not-divisible": {
    severity: "error",
    cause: "The fast task must run a whole number of times in each slow step.",
    example: "step: 5 ms\nguard_step: 2 ms",
    fix: "Choose a guard step that divides the step, for example 1 ms.",
  },
} as const satisfies Record<string, Explanation>;
