import type { Trace } from "../../hil-sim/index.ts";
import type { Command } from "./commands.ts";
import { clipped } from "./margin.ts";
import { recorded, samplesIn } from "./recorded.ts";

/**
 * Mean of true minus wanted boost over the last `over` seconds before the next command (or the end), as a ratio of the
 * mean wanted boost, either sign.
 *   margin = (atMost - |mean error|) / atMost, at least -3
 * The hold that opens a trace is a start, not an answer: it is judged only where no command follows. The least margin
 * counts. Windows shorter than `over` cannot be judged; undefined (not exercised) when none was.
 */
export function steadyError(
  trace: Trace,
  commands: readonly Command[],
  atMost: number,
  over: number,
): number | undefined {
  const boost = recorded(trace, "boost_pressure");
  const wanted = recorded(trace, "boost_wanted");
  const count = samplesIn(trace, over);
  let least: number | undefined;
  const answers = commands.filter(({ begins }) => begins > 0);
  for (const command of answers.length > 0 ? answers : commands) {
    if (command.until - command.at < count) continue;
    let error = 0;
    let sum = 0;
    for (let k = command.until - count; k < command.until; k++) {
      error += boost[k] - wanted[k];
      sum += wanted[k];
    }
    const margin = clipped((atMost - Math.abs(error / sum)) / atMost);
    if (least === undefined || margin < least) least = margin;
  }
  return least;
}
