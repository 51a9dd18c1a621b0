import type { Trace } from "../../hil-sim/index.ts";
import { recorded, samplesIn } from "./recorded.ts";

/** A hold of the wanted boost and the change that led to it. Positions are sample numbers. */
export interface Command {
  readonly direction: "hold" | "rise" | "fall";
  /** First sample at which the wanted boost left its former value. */
  readonly begins: number;
  /** The command itself: the step, or the end of the ramp. */
  readonly at: number;
  /** One past the last sample of the window: where the next command begins, or the trace ends. */
  readonly until: number;
  /** Wanted boost before and after, kPa abs. */
  readonly from: number;
  readonly to: number;
}

/** Smaller moves than this ratio of the value held are none: noise, compensation, a slow course. */
const STILL_WITHIN = 0.01;
/** Seconds the wanted boost must be still for a change to have ended. */
const HELD_FOR = 0.1;
/** A move that never gets further than this ratio from where it began is drift: it ends no window and opens none. */
const LEAST_CHANGE = 0.05;

/**
 * The commands in the wanted boost (after ceilings, before guard and slew) of a trace, in order.
 * A sample further than 1 % from the value held takes its place; when a value has been held for 0.1 s the change has
 * ended, and the command is the sample at which that value was taken: exact for a step, at most 1 % early for a ramp.
 * The first value held opens the trace as a `hold`, and so does a change that comes back to where it began. Moves below
 * 5 % are drift. A change still going on at the end closes the last window and is no command.
 */
export function findCommands(trace: Trace): Command[] {
  const wanted = recorded(trace, "boost_wanted");
  const heldFor = samplesIn(trace, HELD_FOR);
  const changes: Change[] = [];
  let change: Change = { begins: 0, at: 0, furthest: 0, from: wanted[0] };
  let still = false;
  for (let k = 1; k < trace.length; k++) {
    const held = wanted[change.at];
    if (!(Math.abs(wanted[k] - held) <= STILL_WITHIN * held)) {
      if (still) change = { begins: k, at: k, furthest: 0, from: wanted[k - 1] };
      still = false;
      change.at = k;
      change.furthest = Math.max(change.furthest, Math.abs(wanted[k] / change.from - 1));
    } else if (!still && k - change.at >= heldFor) {
      still = true;
      if (changes.length === 0 || change.furthest >= LEAST_CHANGE) changes.push(change);
    }
  }
  const open = !still && change.furthest >= LEAST_CHANGE ? change.begins : trace.length;
  return changes.map((each, index) => command(each, changes[index + 1]?.begins ?? open, wanted, index === 0));
}

interface Change {
  readonly begins: number;
  at: number;
  /** Largest ratio by which the wanted boost has left `from`. */
  furthest: number;
  readonly from: number;
}

function command(change: Change, until: number, wanted: Float64Array, first: boolean): Command {
  const to = wanted[change.at];
  const from = first ? to : change.from;
  const moved = to / from - 1;
  const direction = moved >= LEAST_CHANGE ? "rise" : moved <= -LEAST_CHANGE ? "fall" : "hold";
  return { direction, begins: change.begins, at: change.at, until, from, to };
}
