import type { Count, Flag, Real } from "./types.ts";

export interface Structure {
  readonly stepS: Real;
  readonly historySteps: Count;
  readonly shape: "curve" | "table";
  readonly extra: Flag;
}
