import type { ControllerSpec, CurveSpec, Quantity, Span, TableSpec } from "../../spec/index.ts";

/** One calibration value by its place in the spec: `feedback.proportional`. */
export type CalibrationEntry = { readonly path: string; readonly at: Span } & (
  | { readonly kind: "number"; readonly written: string }
  | { readonly kind: "curve"; readonly curve: CurveSpec }
  | { readonly kind: "table"; readonly table: TableSpec }
);

type Fields = Readonly<Record<string, unknown>>;

function isFields(value: unknown): value is Fields {
  return typeof value === "object" && value !== null;
}

function isQuantity(value: Fields): value is Fields & Quantity {
  return typeof value.written === "string" && typeof value.value === "number" && "at" in value;
}

function isTable(value: Fields): value is Fields & TableSpec {
  return "rowsOver" in value && Array.isArray(value.values);
}

function isCurve(value: Fields): value is Fields & CurveSpec {
  return "over" in value && Array.isArray(value.axis) && Array.isArray(value.values);
}

/** Keys of the data are the file's keys in camel case; a gain's wrapper has no key in the file. */
function pathOf(parent: string, key: string): string {
  if (key === "quantity" || key === "curve") return parent;
  const written = key.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`);
  return parent === "" ? written : `${parent}.${written}`;
}

function entriesAt(value: unknown, path: string): CalibrationEntry[] {
  if (!isFields(value)) return [];
  if (isQuantity(value)) return [{ kind: "number", path, written: value.written, at: value.at }];
  if (isTable(value)) return [{ kind: "table", path, table: value, at: value.at }];
  if (isCurve(value)) return [{ kind: "curve", path, curve: value, at: value.at }];
  return Object.entries(value).flatMap(([key, part]) =>
    key === "at" ? [] : entriesAt(part, pathOf(path, key)),
  );
}

/** Every number, curve and table of a controller, in the order of the spec's lines. */
export function calibrationEntries(controller: ControllerSpec): CalibrationEntry[] {
  return entriesAt(controller, "").sort((a, b) => a.at.line - b.at.line);
}
