import type { Span } from "./span.ts";

/** A number read from a spec, converted to its base unit, with the text it was written as. */
export interface Quantity {
  /** In the base unit of its place: kPa, rpm, ratio 0..1, mm2, s, K, kg/s in a controller; SI in a plant file. */
  readonly value: number;
  /** As the engineer wrote it, with the unit: `245 kPa abs`. For a default: the default in the same form. */
  readonly written: string;
  readonly at: Span;
}

/** A time, exact: `numerator / denominator` seconds, so that whole steps can be counted without rounding. */
export interface Duration extends Quantity {
  readonly numerator: bigint;
  readonly denominator: bigint;
}

export interface Range {
  readonly low: Quantity;
  readonly high: Quantity;
}

/** Values over one axis, both in base units; the axis strictly increasing. */
export interface CurveSpec {
  /** What the axis is: a signal or plain coordinate such as `engine_speed`, `opening`, `target_pressure`. */
  readonly over: string;
  readonly axis: readonly number[];
  readonly values: readonly number[];
  /** Unit as written, for comments. */
  readonly unit: string;
  readonly axisUnit: string;
  readonly at: Span;
}

/** Values over two axes, row-major: `values[row * columns.length + column]`. */
export interface TableSpec {
  readonly rowsOver: string;
  readonly rows: readonly number[];
  readonly rowsUnit: string;
  readonly columnsOver: string;
  readonly columns: readonly number[];
  readonly columnsUnit: string;
  readonly values: readonly number[];
  readonly unit: string;
  readonly at: Span;
}
