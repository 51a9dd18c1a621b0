import type { Span } from "./span.ts";

/** Signals a requirement may speak of; base units as in traces: kPa, rpm, ratio, N·m, kg/s, flag 0/1. */
export const TRACE_SIGNALS = {
  boost_pressure: "kPa abs",
  boost_measured: "kPa abs",
  boost_wanted: "kPa abs",
  boost_target: "kPa abs",
  manifold_pressure: "kPa abs",
  exhaust_pressure: "kPa abs",
  ambient_pressure: "kPa abs",
  turbo_speed: "rpm",
  turbo_speed_measured: "rpm",
  engine_speed: "rpm",
  accelerator: "ratio",
  wastegate_opening: "ratio",
  wastegate_command: "ratio",
  torque_limit: "ratio",
  compressor_flow: "kg/s",
  engine_torque: "N*m",
  tripped: "flag",
  guard_active: "flag",
  fail_safe: "flag",
} as const;
export type TraceSignal = keyof typeof TRACE_SIGNALS;

/** `signal` above / below / within bounds, base units; `scale` normalises the distance to the bound. */
export interface Comparison {
  readonly signal: TraceSignal;
  readonly above?: number;
  readonly below?: number;
  readonly scale: number;
  readonly at: Span;
}

export type Pattern =
  /** Throughout (while `condition` holds, if given) every comparison holds. */
  | { readonly kind: "stays"; readonly holds: Comparison; readonly condition?: Comparison }
  /** Boost above the wanted target after each rise of the target, as a ratio of the target or of the step. */
  | { readonly kind: "overshoot"; readonly of: "target" | "step"; readonly atMost: number }
  /** Boost enters `band` (ratio of the wanted target) and stays: within seconds of the command, or of first reaching it. */
  | {
      readonly kind: "settles";
      readonly band: number;
      readonly within: number;
      readonly after: "command" | "reached";
    }
  /** Boost covers `fraction` of the step to the wanted target within seconds of the command. */
  | { readonly kind: "rises"; readonly fraction: number; readonly within: number }
  /** Mean of boost minus wanted over the last `over` seconds, as a ratio of the wanted target. */
  | { readonly kind: "steady_error"; readonly atMost: number; readonly over: number }
  /** Each time `when` becomes true, `then` is true within seconds and stays so for `lasting` seconds. */
  | {
      readonly kind: "reacts";
      readonly when: Comparison;
      readonly then: Comparison;
      readonly within: number;
      readonly lasting: number;
    };

export interface RequirementSpec {
  readonly id: string;
  readonly says: string;
  /** Names of scenarios; empty: all. */
  readonly scenarios: readonly string[];
  readonly pattern: Pattern;
  /** Skip runs whose plant cannot reach the wanted target (steady solver); default true for target patterns. */
  readonly onlyIfReachable: boolean;
  readonly at: Span;
}
