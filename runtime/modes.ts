import type { Flag } from "./types.ts";

/** What the slow step is doing. */
export type Mode = "start" | "no_boost" | "closed_loop" | "guard" | "fail_safe";

/**
 * The only place where the mode changes. The first line that applies wins:
 *   fail_safe    a signal that the loop cannot do without has failed
 *   start        such a signal has not given a good sample yet
 *   guard        the overspeed guard holds the gate further open than the loop wants
 *   no_boost     the wanted pressure is about ambient
 *   closed_loop  otherwise
 */
export function chooseMode(failed: Flag, ready: Flag, guardActive: Flag, boostWanted: Flag): Mode {
  let mode: Mode = "closed_loop";
  if (failed) {
    mode = "fail_safe";
  } else if (!ready) {
    mode = "start";
  } else if (guardActive) {
    mode = "guard";
  } else if (!boostWanted) {
    mode = "no_boost";
  }
  return mode;
}
