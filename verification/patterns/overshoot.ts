import type { Trace } from "../../hil-sim/index.ts";
import type { Command } from "./commands.ts";
import { clipped } from "./margin.ts";
import { recorded } from "./recorded.ts";

/** A target counts as entered when the true boost has come this near to it, as a ratio of the target. */
export const ENTERED_WITHIN = 0.025;

/**
 * True boost above the wanted boost between one command and the next, as a ratio of the wanted boost or of the step.
 *   margin = (atMost - largest excess) / atMost, the excess not below 0
 * A rise is judged from its command on, if the boost comes within 2.5 % of the target; a fall from the first sample at
 * which the boost is no longer above the target, so that the way down is no overshoot. The least margin of all
 * commands counts. Undefined (not exercised) when no command was judged.
 */
export function overshoot(
  trace: Trace,
  commands: readonly Command[],
  of: "target" | "step",
  atMost: number,
): number | undefined {
  let least: number | undefined;
  for (const command of commands) {
    const excess = largestExcess(trace, command, of);
    if (excess === undefined) continue;
    const margin = clipped((atMost - excess) / atMost);
    if (least === undefined || margin < least) least = margin;
  }
  return least;
}

function largestExcess(trace: Trace, command: Command, of: "target" | "step"): number | undefined {
  if (command.direction === "hold") return undefined;
  const boost = recorded(trace, "boost_pressure");
  const wanted = recorded(trace, "boost_wanted");
  const step = Math.abs(command.to - command.from);
  let judging = command.direction === "rise";
  let entered = false;
  let largest = 0;
  for (let k = command.at; k < command.until; k++) {
    if (!judging && boost[k] <= wanted[k]) judging = true;
    if (!judging) continue;
    const excess = (boost[k] - wanted[k]) / (of === "target" ? wanted[k] : step);
    if (!(excess <= largest)) largest = excess;
    if (boost[k] >= (1 - ENTERED_WITHIN) * wanted[k]) entered = true;
  }
  return judging && entered ? largest : undefined;
}
