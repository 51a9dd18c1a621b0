import type { Report } from "../diagnostics/report.ts";
import type { PlantSpec } from "../plant-spec.ts";
import type { HoledLoop } from "../read-loop-spec.ts";
import type { Node } from "../text/node.ts";
import { checkFeedback } from "./feedback-rules.ts";
import { checkGuard } from "./guard-rules.ts";
import { locate } from "./locate.ts";
import { checkRequirements } from "./requirement-rules.ts";
import type { Rule, Seen } from "./rule.ts";
import { checkScenario } from "./scenario-rules.ts";
import { checkSignals } from "./signal-rules.ts";
import { checkTarget } from "./target-rules.ts";
import { checkTiming } from "./timing-rules.ts";

/** Every rule about the controller; a new one is one function and one name here. */
const CONTROLLER_RULES: readonly Rule[] = [checkTiming, checkSignals, checkTarget, checkFeedback, checkGuard];

/** Rules that need several values of the file; what could not be read is passed over. */
export function checkLoop(read: HoledLoop, root: Node, plant: PlantSpec | undefined, report: Report): void {
  const { controller, scenarios = [] } = read;
  if (controller !== undefined) {
    const find = (path: readonly (string | number)[]): Node => locate(root, ["controller", ...path]);
    const textOf = (node: Node): string => (node.kind === "scalar" ? node.text : "");
    const seen: Seen = {
      controller,
      plant,
      at: (...path) => find(path).at,
      text: (...path) => textOf(find(path)),
    };
    for (const rule of CONTROLLER_RULES) rule(seen, report);
  }
  for (const { value } of scenarios) if (value !== undefined) checkScenario(value, controller, plant, report);
  checkRequirements(read, report);
}
