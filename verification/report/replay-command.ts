import type { Evidence } from "../evidence.ts";
import { code, type Html } from "./html.ts";

/** The line that runs a counterexample again, in the folder that holds it; names the spec as it was given. */
export function replayCommand(evidence: Evidence, counterexample: string): Html {
  return code(`spoolwright replay ${counterexample} --spec ${evidence.controller.specFile}`);
}
