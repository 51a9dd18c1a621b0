/** A real number in the precision of the target: each operation on it is rounded once. */
export type Real = number;
/** A whole number of 32 bits. */
export type Count = number;
export type Flag = boolean;

/** Values over one strictly increasing axis. */
export interface Curve {
  readonly axis: readonly Real[];
  readonly values: readonly Real[];
}

/** Values over two strictly increasing axes, row after row: `values[row * columns.length + column]`. */
export interface Table2 {
  readonly rows: readonly Real[];
  readonly columns: readonly Real[];
  readonly values: readonly Real[];
}
