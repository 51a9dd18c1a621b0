import { code, type Html } from "./html.ts";

/** The line that runs a counterexample again. */
export function replayCommand(file: string): Html {
  return code(`spoolwright replay ${file}`);
}
