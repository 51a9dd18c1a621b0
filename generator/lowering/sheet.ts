import type { CurveSpec, Duration, Quantity, TableSpec } from "../../spec/index.ts";
import type { CalibrationInfo, CalibrationValue, Comparison } from "../lowered.ts";
import { stepsIn } from "./steps.ts";

/** Limits of a calibration value, both ends included. */
export interface Limits {
  readonly low: number;
  readonly high: number;
}

/** Collects calibration values together with what is known of each, so that the two cannot drift apart. */
export interface Sheet {
  readonly values: { [field: string]: CalibrationValue };
  readonly info: { [path: string]: CalibrationInfo };
  readonly sizes: { [path: string]: number };
}

export const LIMITS = {
  any: { low: -1e9, high: 1e9 },
  notNegative: { low: 0, high: 1e9 },
  ratio: { low: 0, high: 1 },
  seconds: { low: 0, high: 1000 },
  steps: { low: 0, high: 1_000_000 },
  pressure: { low: 1, high: 2000 },
  temperature: { low: 100, high: 2000 },
  speed: { low: 0, high: 1e6 },
} as const satisfies Record<string, Limits>;

export const emptySheet = (): Sheet => ({ values: {}, info: {}, sizes: {} });

/** A number from the spec. */
export function put(sheet: Sheet, field: string, quantity: Quantity, unit: string, limits: Limits): void {
  sheet.values[field] = quantity.value;
  sheet.info[field] = { unit, written: quantity.written, at: quantity.at, ...limits };
}

/** A number made from spec values; `written` says how. */
export function putDerived(
  sheet: Sheet,
  field: string,
  value: number,
  unit: string,
  limits: Limits,
  from?: { readonly written: string; readonly at: Quantity["at"] },
): void {
  sheet.values[field] = value;
  sheet.info[field] = { unit, ...limits, ...(from ? { written: from.written, at: from.at } : {}) };
}

/** The number at `path` must stand to an earlier one, `to`, as said. */
export function compare(sheet: Sheet, path: string, is: Comparison["is"], to: string): void {
  const info = sheet.info[path];
  sheet.info[path] = { ...info, comparisons: [...(info.comparisons ?? []), { is, to }] };
}

/** A duration counted in steps of its task. */
export function putSteps(sheet: Sheet, field: string, duration: Duration, step: Duration): void {
  sheet.values[field] = stepsIn(duration, step);
  sheet.info[field] = {
    unit: `steps of ${step.written}`,
    written: duration.written,
    at: duration.at,
    ...LIMITS.steps,
  };
}

/** A struct of fields filled by `fill` on a sheet of its own. */
export function putStruct(sheet: Sheet, field: string, fill: (inner: Sheet) => void): void {
  const inner = emptySheet();
  fill(inner);
  sheet.values[field] = inner.values;
  for (const [path, info] of Object.entries(inner.info)) {
    sheet.info[`${field}.${path}`] = info;
  }
}

export function putCurve(
  sheet: Sheet,
  field: string,
  curve: CurveSpec,
  units: { readonly axis: string; readonly values: string },
  limits: Limits,
  increasingValues = false,
): void {
  sheet.values[field] = { axis: curve.axis, values: curve.values };
  sheet.info[`${field}.axis`] = { unit: units.axis, at: curve.at, increasing: true, ...LIMITS.any };
  sheet.info[`${field}.values`] = {
    unit: units.values,
    at: curve.at,
    ...limits,
    ...(increasingValues ? { increasing: true } : {}),
  };
  sheet.sizes[`Calibration.${field}.axis`] = curve.axis.length;
  sheet.sizes[`Calibration.${field}.values`] = curve.values.length;
}

export function putTable(
  sheet: Sheet,
  field: string,
  table: TableSpec,
  units: { readonly rows: string; readonly columns: string; readonly values: string },
  limits: Limits,
): void {
  sheet.values[field] = { rows: table.rows, columns: table.columns, values: table.values };
  sheet.info[`${field}.rows`] = { unit: units.rows, at: table.at, increasing: true, ...LIMITS.any };
  sheet.info[`${field}.columns`] = { unit: units.columns, at: table.at, increasing: true, ...LIMITS.any };
  sheet.info[`${field}.values`] = { unit: units.values, at: table.at, ...limits };
  sheet.sizes[`Calibration.${field}.rows`] = table.rows.length;
  sheet.sizes[`Calibration.${field}.columns`] = table.columns.length;
  sheet.sizes[`Calibration.${field}.values`] = table.values.length;
}

/** Smallest legal curve, for a place that the chosen structure never reads. */
export function putUnusedCurve(sheet: Sheet, field: string): void {
  sheet.values[field] = { axis: [0, 1], values: [0, 1] };
  for (const part of ["axis", "values"]) {
    sheet.info[`${field}.${part}`] = { unit: "1" };
    sheet.sizes[`Calibration.${field}.${part}`] = 2;
  }
}

/** Smallest legal table, for a place that the chosen structure never reads. */
export function putUnusedTable(sheet: Sheet, field: string): void {
  sheet.values[field] = { rows: [0, 1], columns: [0, 1], values: [0, 0, 0, 0] };
  for (const [part, size] of [
    ["rows", 2],
    ["columns", 2],
    ["values", 4],
  ] as const) {
    sheet.info[`${field}.${part}`] = { unit: "1" };
    sheet.sizes[`Calibration.${field}.${part}`] = size;
  }
}

/** Numbers that the chosen structure never reads. */
export function putUnused(sheet: Sheet, ...fields: readonly string[]): void {
  for (const field of fields) {
    sheet.values[field] = 1;
    sheet.info[field] = { unit: "1" };
  }
}
