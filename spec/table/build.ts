// The words the tables are written in.
import { knownUnit } from "../quantities/unit-expression.ts";
import type {
  Axes,
  Key,
  KeySet,
  Kind,
  Limits,
  Need,
  Shapes,
  TupleKind,
  UnitChoice,
  VariantSet,
  WordKind,
} from "./kind.ts";

type When = NonNullable<UnitChoice["when"]>;
type Units = UnitChoice | readonly UnitChoice[];

const many = (units: Units): readonly UnitChoice[] => (Array.isArray(units) ? units : [units as UnitChoice]);

/** An amount, stored in `base`, written in `shown` by example. */
export const amount = (shown: string, base = shown, when?: When, example?: string): UnitChoice => ({
  base: knownUnit(base),
  shown,
  ...(when === undefined ? {} : { when }),
  ...(example === undefined ? {} : { example }),
});
/** Stored 0..1; written in % or bare. */
export const ratioUnit = (when?: When): UnitChoice => amount("%", "", when);
export const bareUnit: UnitChoice = amount("", "");

export const absolutePressure = (base: string): UnitChoice => ({
  base: knownUnit(base),
  shown: "kPa abs",
  level: "pressure",
  gauge: "refused",
});
export const temperatureLevel: UnitChoice = { base: knownUnit("K"), shown: "degC", level: "temperature" };

export const quantity = (units: Units, limits: Limits = {}) =>
  ({ kind: "quantity", units: many(units), limits }) as const;
/** Longest time that is counted in steps. */
const LONGEST: Limits = { atMost: "600 s" };
export const duration = (limits: Limits = { atLeast: "0" }) =>
  ({ kind: "duration", units: [amount("ms", "s")], limits: { ...LONGEST, ...limits } }) as const;
export const range = (units: Units, limits: Limits = {}) =>
  ({ kind: "range", units: many(units), limits }) as const;
export const free = (units: Units, limits: Limits = {}) =>
  ({ kind: "free", units: many(units), limits }) as const;
export const tuple = <N extends number>(...elements: TupleKind<N>["elements"]) =>
  ({ kind: "tuple", elements }) as const;
export const words = <const W extends string>(...all: readonly W[]): WordKind<W> => ({
  kind: "word",
  words: all,
});
export const identifier = { kind: "text", form: "identifier" } as const;
export const sentence = { kind: "text", form: "sentence" } as const;
export const path = { kind: "text", form: "path" } as const;
export const reference = { kind: "reference" } as const;
export const flag = { kind: "flag" } as const;
export const integer = (least: number, most: number) => ({ kind: "integer", least, most }) as const;

export const curve = (over: Axes, units: Units, limits: Limits = {}, increasing?: true) =>
  ({ kind: "curve", over, units: many(units), limits, ...(increasing ? { increasing } : {}) }) as const;
export const table = (rows: Axes, columns: Axes, units: Units, limits: Limits = {}) =>
  ({ kind: "table", rows, columns, units: many(units), limits }) as const;

interface BlockOptions {
  readonly oneOf?: readonly string[];
  readonly reserved?: readonly string[];
}
export const block = <const Keys extends KeySet>(keys: Keys, options: BlockOptions = {}) =>
  ({ kind: "block", keys, ...options }) as const;
export const list = <const Of extends Kind>(of: Of) => ({ kind: "list", of }) as const;
export const map = <const Of extends Kind>(of: Of) => ({ kind: "map", of }) as const;
export const variants = <const Tag extends string, const V extends VariantSet>(
  tag: Tag,
  description: string,
  all: V,
) => ({ kind: "variants", tag, description, variants: all }) as const;
export const shape = <const S extends Shapes>(shapes: S) => ({ kind: "shape", shapes }) as const;

// `NoInfer` keeps the kind from being widened to what the surrounding block accepts.
interface Of<K extends Kind, N extends Need> extends Key<K, N> {
  readonly of: NoInfer<K>;
}
export const required = <const K extends Kind>(of: K, description: string, example: string) =>
  ({ of, need: "required", description, example }) as Of<NoInfer<K>, "required">;
export const optional = <const K extends Kind>(of: K, description: string, example: string) =>
  ({ of, need: "optional", description, example }) as Of<NoInfer<K>, "optional">;
/** Absent, it has the value `usual`. */
export const standard = <const K extends Kind>(of: K, usual: string, description: string, example = usual) =>
  ({ of, need: "default", description, example, standard: usual }) as Of<NoInfer<K>, "default">;
export const structural = <const K extends Key>(key: K) =>
  ({ ...key, structural: true }) as NoInfer<K> & { readonly structural: true };
