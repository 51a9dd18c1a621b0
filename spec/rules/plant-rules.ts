import type { Report } from "../diagnostics/report.ts";
import type { Value } from "../table/kind.ts";
import type { PLANT_BLOCK } from "../table/plant-table.ts";

export type HoledPlant = Value<typeof PLANT_BLOCK, "holed">;

/** Rules about a plant file that need several of its values. */
export function checkPlant(_plant: HoledPlant, _report: Report): void {}
