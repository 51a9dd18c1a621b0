import type { Report } from "../diagnostics/report.ts";
import type { PlantSpec } from "../plant-spec.ts";
import type { HoledLoop } from "../read-loop-spec.ts";
import type { Span } from "../span.ts";
import type { Placed } from "../table/kind.ts";

export type Controller = NonNullable<HoledLoop["controller"]>;

/** What a rule sees: the controller with holes where reading failed, and the plant if it is known. */
export interface Seen {
  readonly controller: Controller;
  readonly plant: PlantSpec | undefined;
  /** Span of the node at a path below `controller`, for cells of tables; the nearest enclosing node if it is not there. */
  readonly at: (...path: readonly (string | number)[]) => Span;
  /** Text of the scalar there, as written. */
  readonly text: (...path: readonly (string | number)[]) => string;
}

export type Rule = (seen: Seen, report: Report) => void;

/** Place of a key that is written in the file; undefined when the value is a default. */
export const writtenAt = (block: Placed | undefined, key: string): Span | undefined => {
  const at = block?.places[key];
  return at === block?.span ? undefined : at;
};

/** Few digits, for messages. */
export const short = (value: number): string => String(Number(value.toPrecision(4)));
