import type { Free } from "../../spec/index.ts";

/** Round values of a range: `centre + k * step` for whole k from `least` to `most`; k = 0 is the simplest. */
export interface Grid {
  readonly offset: number;
  readonly centre: number;
  readonly step: number;
  readonly least: number;
  readonly most: number;
}

/** Zero of the scale that an engineer reads: degrees Celsius count from 273.15 K. */
const OFFSETS: Readonly<Record<string, number>> = { degC: 273.15 };

/** A grid over the range with at least `divisions` steps of 1, 2 or 5 times a power of ten, about its rounded middle. */
export function gridOver(free: Free, divisions: number): Grid {
  const offset = OFFSETS[free.unit] ?? 0;
  const low = free.low - offset;
  const high = free.high - offset;
  const step = roundStep((high - low) / divisions);
  const middle = Math.floor((low + high) / 2 / step + 0.5);
  const slack = 1e-9;
  return {
    offset,
    centre: middle,
    step,
    least: Math.ceil(low / step - slack) - middle,
    most: Math.floor(high / step + slack) - middle,
  };
}

/** The value at whole number k of the grid, free of the last digits that multiplication leaves. */
export function gridValue(grid: Grid, k: number): number {
  return tidy(tidy((grid.centre + k) * grid.step) + grid.offset);
}

/** The whole number whose value is nearest. */
export function nearestOnGrid(grid: Grid, value: number): number {
  const k = Math.floor((value - grid.offset) / grid.step + 0.5) - grid.centre;
  return Math.min(Math.max(k, grid.least), grid.most);
}

/** The largest of 1, 2, 5 times a power of ten that is not above `size`. */
function roundStep(size: number): number {
  const [digit, exponent] = size.toExponential(0).split("e").map(Number);
  const candidates = [5, 2, 1].map((head) => Number(`${head}e${exponent}`)).filter((step) => step <= size);
  return candidates[0] ?? Number(`5e${exponent - (digit > 0 ? 1 : 0)}`);
}

function tidy(value: number): number {
  return Number(value.toPrecision(12));
}
