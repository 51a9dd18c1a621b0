import type { Trace } from "../../hil-sim/index.ts";
import type { Pattern } from "../../spec/index.ts";
import type { Command } from "./commands.ts";
import { clipped } from "./margin.ts";
import { recorded, samplesIn } from "./recorded.ts";

type Settles = Extract<Pattern, { kind: "settles" }>;

/**
 * True boost within `band` of the wanted boost (a ratio of it) for good, within the time after each command, or after
 * first coming into the band.
 *   margin = (within - settling time) / within
 *   outside at the end of the window: (within - (t_end - t0)) / within - remaining excess / band, at least -3
 * The settling time ends with the last sample outside the band. The least margin of all commands counts. Windows
 * shorter than `within` cannot be judged; undefined (not exercised) when none was.
 */
export function settles(trace: Trace, commands: readonly Command[], pattern: Settles): number | undefined {
  let least: number | undefined;
  for (const command of commands) {
    const margin = settled(trace, command, pattern);
    if (margin !== undefined && (least === undefined || margin < least)) least = margin;
  }
  return least;
}

function settled(trace: Trace, command: Command, pattern: Settles): number | undefined {
  if (command.direction === "hold") return undefined;
  const start = pattern.after === "command" ? command.at : firstInside(trace, command, pattern.band);
  const last = command.until - 1;
  if (start === undefined || last - start < samplesIn(trace, pattern.within)) return undefined;
  if (!isInside(trace, last, pattern.band)) {
    const excess = deviation(trace, last) - pattern.band;
    return clipped(remaining(pattern.within, (last - start) * trace.step) - excess / pattern.band);
  }
  let outside = last;
  while (outside >= start && isInside(trace, outside, pattern.band)) outside--;
  return clipped(remaining(pattern.within, (outside + 1 - start) * trace.step));
}

function firstInside(trace: Trace, command: Command, band: number): number | undefined {
  for (let k = command.at; k < command.until; k++) if (isInside(trace, k, band)) return k;
  return undefined;
}

function isInside(trace: Trace, k: number, band: number): boolean {
  return deviation(trace, k) <= band;
}

/** Distance of the true boost from the wanted boost, as a ratio of the wanted boost. */
function deviation(trace: Trace, k: number): number {
  const wanted = recorded(trace, "boost_wanted")[k];
  return Math.abs(recorded(trace, "boost_pressure")[k] - wanted) / wanted;
}

/** The part of the time allowed that is left. */
function remaining(within: number, seconds: number): number {
  return (within - seconds) / within;
}
