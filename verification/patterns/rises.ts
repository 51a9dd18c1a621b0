import type { Trace } from "../../hil-sim/index.ts";
import type { Pattern } from "../../spec/index.ts";
import type { Command } from "./commands.ts";
import { clipped } from "./margin.ts";
import { recorded, samplesIn } from "./recorded.ts";

type Rises = Extract<Pattern, { kind: "rises" }>;

/**
 * True boost covers `fraction` of the way from where it was when the target began to rise to the wanted boost, within
 * the time after the command.
 *   margin = (within - time taken) / within
 *   not covered by the end of the window: (within - (t_end - t0)) / within - (fraction - covered) / fraction, at least -3
 * The least margin of all rises counts; a rise whose window ends before the time has passed, uncovered, cannot be
 * judged. Undefined (not exercised) when none was judged.
 */
export function rises(trace: Trace, commands: readonly Command[], pattern: Rises): number | undefined {
  let least: number | undefined;
  for (const command of commands) {
    if (command.direction !== "rise") continue;
    const margin = risen(trace, command, pattern);
    if (margin !== undefined && (least === undefined || margin < least)) least = margin;
  }
  return least;
}

function risen(trace: Trace, command: Command, { fraction, within }: Rises): number | undefined {
  const boost = recorded(trace, "boost_pressure");
  const wanted = recorded(trace, "boost_wanted");
  const from = boost[command.begins];
  for (let k = command.at; k < command.until; k++) {
    const covered = boost[k] - from >= fraction * (wanted[k] - from);
    if (covered) return clipped((within - (k - command.at) * trace.step) / within);
  }
  const last = command.until - 1;
  if (last - command.at < samplesIn(trace, within)) return undefined;
  const missing = fraction - (boost[last] - from) / (wanted[last] - from);
  return clipped((within - (last - command.at) * trace.step) / within - missing / fraction);
}
