import type { Report } from "../diagnostics/report.ts";
import type { PlantSpec } from "../plant-spec.ts";
import type { HoledLoop } from "../read-loop-spec.ts";

/** Rules that need several values of the file. */
export function checkLoop(_read: HoledLoop, _plant: PlantSpec | undefined, _report: Report): void {}
