import { abs, clamp, isFinite, max, min, same, sqrt, toCount, toReal } from "./intrinsics.ts";
import type { Structure } from "./structure.ts";
import type { Count, Curve, Flag, Real, Table2 } from "./types.ts";

// A program that uses every operator and every kind of statement of the language, each printer's specimen.

export type Phase = "idle" | "busy" | "done";

/** Gain on the curve, no unit. */
export const GAIN: Real = 0.1;

export interface Calibration {
  /** Output over input. */
  readonly curve: Curve;
  readonly table: Table2;
  readonly limits: Limits;
  readonly steps: Count;
  readonly armed: Flag;
  /** Only read when `extra` is chosen. */
  readonly extraGain: Real;
}

export interface Limits {
  readonly low: Real;
  readonly high: Real;
}

export interface State {
  inner: Inner;
  phase: Phase;
  history: Real[];
  next: Count;
  /** Only written: left out. */
  unread: Real;
}

export interface Inner {
  value: Real;
  primed: Flag;
}

export interface Exchange {
  level: Real;
  ready: Flag;
}

export interface Input {
  readonly valueKpa: Real;
  readonly enable: Flag;
}

export interface Output {
  resultKpa: Real;
  phase: Phase;
  count: Count;
  flag: Flag;
}

/** Both sides of each comparison of reals, and what NaN does to them. */
function compareReals(a: Real, b: Real): Flag {
  const ordered = (a < b || a <= b) && !(a > b);
  return ordered !== a >= b || same(a, b) === isFinite(a);
}

/**
 * Whole-number arithmetic.
 *   n = (2 - a) b + 1, negated
 */
function countThings(a: Count, b: Count): Count {
  const n: Count = (2 - a) * b + 1;
  const small = (n < 3 || a <= 4) && !(b > 100) && !(a >= 200);
  return small && n !== 5 && !(n === 6) ? -n : n;
}

function look(curve: Curve, x: Real): Real {
  let value: Real = curve.values[0];
  for (let i = 0; i < curve.axis.length; i++) {
    if (x >= curve.axis[i]) {
      value = curve.values[i];
    }
  }
  return value;
}

/** Keeps the newest value; `x` enters the ring of `history`. */
function remember(structure: Structure, state: State, x: Real): void {
  state.history[state.next] = x;
  state.next = state.next + 1 >= structure.historySteps ? 0 : state.next + 1;
}

function settle(inner: Inner, x: Real, stepS: Real): Real {
  if (!inner.primed) {
    inner.value = x;
    inner.primed = true;
  }
  inner.value = inner.value + (x - inner.value) * stepS;
  return inner.value;
}

function nextPhase(phase: Phase, enable: Flag): Phase {
  let next: Phase = phase;
  switch (phase) {
    case "idle":
      next = enable ? "busy" : "idle";
      break;
    case "busy":
    case "done":
      if (enable) {
        next = "done";
      } else if (phase !== "done") {
        next = "idle";
      }
      break;
    default:
      break;
  }
  return next;
}

/** Sets everything as after power-on. */
export function start(structure: Structure, state: State, exchange: Exchange): void {
  state.inner.value = 0;
  state.inner.primed = false;
  state.phase = "idle";
  state.unread = 0;
  state.next = 0;
  for (let i = 0; i < structure.historySteps; i++) {
    state.history[i] = -0;
  }
  exchange.level = 0;
  exchange.ready = false;
}

/** The slow step of the specimen. */
export function stepSlow(
  structure: Structure,
  calibration: Calibration,
  state: State,
  exchange: Exchange,
  input: Input,
  output: Output,
): void {
  const level = exchange.level;
  const raw = clamp(input.valueKpa, calibration.limits.low, calibration.limits.high);
  let looked: Real = 0;
  if (structure.shape === "curve") {
    looked = look(calibration.curve, raw);
  } else {
    looked = calibration.table.values[calibration.table.columns.length - 1] * calibration.table.rows[0];
  }
  // the root of the distance, and its sign turned
  const root = sqrt(abs(looked * GAIN - level));
  const settled = settle(state.inner, -root, structure.stepS);
  remember(structure, state, settled);
  state.unread = settled;
  let result: Real = min(max(settled, raw), 1e6) / 3;
  if (structure.extra) {
    result = result * calibration.extraGain;
  }
  const whole = toCount(result, -1000, 1000);
  const counted = countThings(whole, calibration.steps);
  const busy = state.phase === "busy";
  state.phase = nextPhase(state.phase, calibration.armed && input.enable);
  output.resultKpa = busy ? result : toReal(counted);
  output.phase = busy ? "busy" : state.phase;
  output.count = busy ? counted : whole;
  output.flag = busy ? compareReals(raw, level) : state.inner.primed;
  exchange.ready = true;
}

/** The fast step of the specimen. */
export function stepFast(state: State, exchange: Exchange): void {
  exchange.level = state.history[0];
}
