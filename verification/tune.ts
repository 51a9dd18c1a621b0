import {
  openingForBoost,
  type PlantParameters,
  plantParameters,
  standardPressure,
  wastegateArea,
} from "../hil-sim/index.ts";
import type { CurveSpec, LoopSpec, TableSpec } from "../spec/index.ts";
import { monotonicTable } from "./monotonic-table.ts";
import { setInSpec } from "./set-in-spec.ts";

const RADIAN_PER_RPM = 0.10471975511965977;
const SQUARE_MILLIMETRES = 1e6;
/** K: the standard day of the feedforward table. */
const STANDARD_TEMPERATURE = 298.15;

/** What the plant says about the two tables of a controller; absent where the spec has no such table. */
export interface Tuning {
  /** Effective area over the spec's openings, mm2. */
  readonly gateArea?: readonly number[];
  /** Row after row as in the spec, mm2 or ratio of opening by the feedback coordinate. */
  readonly feedforward?: readonly number[];
  /** Cells whose boost the plant cannot hold; they are continued from their neighbours. */
  readonly outOfReach: readonly { readonly row: number; readonly column: number; readonly why: string }[];
}

/**
 * Gate curve and feedforward table computed from the plant: the gate that holds each pressure at each engine speed in
 * steady state, wide open throttle, 25 degC, sea level. Pure; throws when the spec has no plant.
 */
export function tuneFeedforward(loop: LoopSpec): Tuning {
  if (loop.plant === undefined) throw new Error("a spec without a plant cannot be tuned");
  const parameters = plantParameters(loop.plant);
  const { wastegateArea: curve, feedforward, feedback } = loop.controller;
  const held = feedforward && feedforwardOpenings(parameters, feedforward);
  const areas = feedback.coordinate === "effective_area";
  return {
    ...(curve && { gateArea: gateCurve(parameters, curve) }),
    ...(held && {
      feedforward: held.openings.map((opening) =>
        areas ? roundTo(areaAt(parameters, opening), 0.1) : roundTo(opening, 0.0005),
      ),
    }),
    outOfReach: held?.outOfReach ?? [],
  };
}

function gateCurve(parameters: PlantParameters, curve: CurveSpec): number[] {
  return curve.axis.map((opening) => roundTo(areaAt(parameters, opening), 0.1));
}

/** mm2. */
function areaAt(parameters: PlantParameters, opening: number): number {
  return wastegateArea(parameters, opening) * SQUARE_MILLIMETRES;
}

function feedforwardOpenings(parameters: PlantParameters, table: TableSpec) {
  const outOfReach: { row: number; column: number; why: string }[] = [];
  const openings = table.rows.flatMap((row, i) =>
    table.columns.map((rpm, j) => {
      const pascal = table.rowsOver === "pressure_ratio" ? row * standardPressure(0) : row * 1000;
      const found = holding(parameters, rpm, pascal);
      if (found.why !== undefined) outOfReach.push({ row: i, column: j, why: found.why });
      return found.opening;
    }),
  );
  return { openings: monotonicTable(openings, table.columns.length), outOfReach };
}

/** The opening that holds a boost Pa at an engine speed, or the end stop that comes nearest and why. */
function holding(
  parameters: PlantParameters,
  rpm: number,
  boost: number,
): { readonly opening: number; readonly why?: string } {
  const point = {
    throttle: 1,
    bypass: 0,
    fuel: 1,
    engineSpeed: rpm * RADIAN_PER_RPM,
    ambientPressure: standardPressure(0),
    ambientTemperature: STANDARD_TEMPERATURE,
  };
  const found = openingForBoost(parameters, point, boost);
  if (found.kind === "held") return { opening: found.opening };
  if (found.kind === "unsteady") return { opening: 0, why: "no steady state: surge" };
  const { lowest, highest } = found.reachable;
  const limit = found.opening === 0 ? `closed gives ${bar(highest)}` : `open gives ${bar(lowest)}`;
  return { opening: found.opening, why: limit };
}

function bar(pascal: number): string {
  return `${(pascal / 1e5).toFixed(2)} bar abs`;
}

/** The spec's text with the tuned values in place, comments kept. */
export function writeTuning(text: string, loop: LoopSpec, tuning: Tuning): string {
  const { wastegateArea: curve, feedforward: table } = loop.controller;
  let result = text;
  if (tuning.gateArea && curve) {
    const values = inUnit(tuning.gateArea, curve.unit);
    result = setInSpec(result, "controller.wastegate.effective_area.values", values);
  }
  if (tuning.feedforward && table) {
    const values = inUnit(tuning.feedforward, table.unit);
    const columns = table.columns.length;
    const rows = table.rows.map((_, i) => values.slice(i * columns, (i + 1) * columns));
    result = setInSpec(result, "controller.feedforward.values", rows);
  }
  return result;
}

/** Values in the unit the table is written in; areas are kept in mm2 and openings as ratios. */
function inUnit(values: readonly number[], unit: string): number[] {
  const factor = UNIT_FACTORS[unit];
  if (factor === undefined) throw new Error(`tune writes mm2, cm2, m2, % and bare ratios, not ${unit}`);
  return values.map((value) => Number((value * factor).toPrecision(6)));
}

const UNIT_FACTORS: Readonly<Record<string, number>> = { mm2: 1, cm2: 1e-2, m2: 1e-6, "%": 100, "": 1 };

function roundTo(value: number, step: number): number {
  return Number((Math.floor(value / step + 0.5) * step).toPrecision(6));
}
