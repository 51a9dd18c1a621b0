import type { PressureReference } from "../../spec/index.ts";

/** Where a controller's calibration keeps what a posed target replaces; a name is absent where the spec has no such value. */
export interface TargetPlaces {
  /** Every cell of the target table. */
  readonly cells: number[];
  /** The object that holds the rest. */
  readonly holder: Record<string, unknown>;
  readonly airAtMost: string;
  readonly ceiling: string;
  readonly ratioCeiling: string;
}

/** A wanted boost in place of table, compensation and ceilings, through the calibration. */
export interface PosedTarget {
  /** kPa abs. */
  pose(kilopascal: number): void;
  liftCeilings(): void;
  /** The calibration as generated. */
  restore(): void;
  /** Call before each slow step: a gauge or ratio target moves with the ambient pressure measured. */
  write(ambientKpa: number): void;
}

/** kPa abs and ratio beyond any boost: ceilings out of the way, still inside the calibration's own limits. */
const NO_CEILING_KPA = 2000;
const NO_CEILING_RATIO = 1000;

/**
 * Writes a posed target into every cell of the table, in the table's own reference, with air compensation off; only
 * when it changed. `round` brings a value to the controller's precision.
 */
export function posedTarget(
  places: TargetPlaces,
  reference: PressureReference,
  round: (value: number) => number,
): PosedTarget {
  const { cells, holder } = places;
  const original = [...cells];
  const kept = [places.airAtMost, places.ceiling, places.ratioCeiling]
    .filter((name) => name in holder)
    .map((name) => ({ name, value: holder[name] }));
  const set = (name: string, value: number) => {
    if (name in holder) holder[name] = value;
  };
  let kilopascal = Number.NaN;
  let written = Number.NaN;
  return {
    pose(target) {
      kilopascal = target;
    },
    liftCeilings() {
      set(places.ceiling, NO_CEILING_KPA);
      set(places.ratioCeiling, NO_CEILING_RATIO);
    },
    restore() {
      for (let i = 0; i < cells.length; i++) cells[i] = original[i];
      for (const { name, value } of kept) holder[name] = value;
      kilopascal = Number.NaN;
      written = Number.NaN;
    },
    write(ambientKpa) {
      const cell = inReference(kilopascal, reference, ambientKpa);
      if (Number.isNaN(cell) || cell === written) return;
      written = cell;
      cells.fill(round(cell));
      set(places.airAtMost, 0);
    },
  };
}

function inReference(kilopascal: number, reference: PressureReference, ambientKpa: number): number {
  if (reference === "gauge") return kilopascal - ambientKpa;
  return reference === "pressure_ratio" ? kilopascal / ambientKpa : kilopascal;
}
