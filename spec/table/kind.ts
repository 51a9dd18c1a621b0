import type { Unit } from "../quantities/unit-expression.ts";
import type { CurveSpec, Duration, Quantity, Range, TableSpec } from "../quantity.ts";
import type { Free } from "../scenario-spec.ts";
import type { Span } from "../span.ts";

/** Keys whose value decides the units of others; see read/choices.ts for where they stand. */
export interface Choices {
  readonly coordinate?: string;
  readonly schedule?: string;
}

/** One unit a value may be written in (any unit of the same dimension), and how it is stored. */
export interface UnitChoice {
  /** Stored in this unit. */
  readonly base: Unit;
  /** What an engineer would write; used in messages and help. */
  readonly shown: string;
  /** A point on a scale that has a zero elsewhere; absent: an amount or a difference. */
  readonly level?: "temperature" | "pressure";
  /** Pressure levels: what `gauge` becomes. */
  readonly gauge?: "refused" | "against_standard_atmosphere" | "kept";
  /** What to paste when this unit is the one wanted; absent: the key's example. */
  readonly example?: string;
  /** Only under these choices. */
  readonly when?: { readonly [Name in keyof Choices]?: readonly string[] };
}

/** Bounds as written, in any unit of the value's dimension; `0` needs none. */
export interface Limits {
  readonly above?: string;
  readonly atLeast?: string;
  readonly below?: string;
  readonly atMost?: string;
}

interface Leaf {
  readonly units: readonly UnitChoice[];
  readonly limits: Limits;
}
export type QuantityKind = Leaf & { readonly kind: "quantity" };
export type DurationKind = Leaf & { readonly kind: "duration" };
/** `a to b`. */
export type RangeKind = Leaf & { readonly kind: "range" };
/** A value or `between a and b`. */
export type FreeKind = Leaf & { readonly kind: "free" };
/** A list of fixed length, each element with its own unit. */
export interface TupleKind<N extends number = number> {
  readonly kind: "tuple";
  readonly elements: readonly Leaf[] & { readonly length: N };
}
export interface WordKind<W extends string = string> {
  readonly kind: "word";
  readonly words: readonly W[];
}
export interface TextKind {
  readonly kind: "text";
  readonly form: "identifier" | "sentence" | "path";
}
/** A name that stands elsewhere in the file. */
export interface ReferenceKind {
  readonly kind: "reference";
}
export interface Reference {
  readonly name: string;
  readonly at: Span;
}
export interface FlagKind {
  readonly kind: "flag";
}
/** A whole number without a unit. */
export interface IntegerKind {
  readonly kind: "integer";
  readonly least: number;
  readonly most: number;
}
export type Axes = Readonly<Record<string, UnitChoice>>;
export interface CurveKind {
  readonly kind: "curve";
  readonly over: Axes;
  readonly units: readonly UnitChoice[];
  readonly limits: Limits;
  readonly increasing?: true;
}
export interface TableKind {
  readonly kind: "table";
  readonly rows: Axes;
  readonly columns: Axes;
  readonly units: readonly UnitChoice[];
  readonly limits: Limits;
}
export interface BlockKind<Keys extends KeySet = KeySet> {
  readonly kind: "block";
  readonly keys: Keys;
  /** Exactly one of these keys must be there. */
  readonly oneOf?: readonly string[];
  /** Keys of the design that are not built yet. */
  readonly reserved?: readonly string[];
}
export interface ListKind<Of extends Kind = Kind> {
  readonly kind: "list";
  readonly of: Of;
}
/** Names of the user's choice to values. */
export interface MapKind<Of extends Kind = Kind> {
  readonly kind: "map";
  readonly of: Of;
}
/** A block whose keys depend on the word at `tag`. */
export interface VariantsKind<Tag extends string = string, V extends VariantSet = VariantSet> {
  readonly kind: "variants";
  readonly tag: Tag;
  readonly description: string;
  readonly variants: V;
}
/** Kind by the shape of the YAML value; `words` are taken before `scalar`. */
export interface ShapeKind<S extends Shapes = Shapes> {
  readonly kind: "shape";
  readonly shapes: S;
}
export interface Shapes {
  readonly words?: WordKind;
  readonly scalar?: Kind;
  readonly list?: Kind;
  readonly map?: Kind;
}

export type Kind =
  | QuantityKind
  | DurationKind
  | RangeKind
  | FreeKind
  | TupleKind
  | WordKind
  | TextKind
  | ReferenceKind
  | FlagKind
  | IntegerKind
  | CurveKind
  | TableKind
  | {
      readonly kind: "block";
      readonly keys: KeySet;
      readonly oneOf?: readonly string[];
      readonly reserved?: readonly string[];
    }
  | { readonly kind: "list"; readonly of: Kind }
  | { readonly kind: "map"; readonly of: Kind }
  | {
      readonly kind: "variants";
      readonly tag: string;
      readonly description: string;
      readonly variants: VariantSet;
    }
  | { readonly kind: "shape"; readonly shapes: Shapes };

export type Need = "required" | "optional" | "default";
export interface Key<K extends Kind = Kind, N extends Need = Need> {
  readonly of: K;
  readonly need: N;
  readonly description: string;
  /** A YAML value that can be pasted after the colon. */
  readonly example: string;
  /** Read by the same reader when the key is absent. */
  readonly standard?: string;
  /** Shapes the code; every other number is a calibration. */
  readonly structural?: true;
}
export type KeySet = { readonly [name: string]: Key };
export type VariantSet = { readonly [name: string]: KeySet };

export type Camel<S extends string> = S extends `${infer A}_${infer B}` ? `${A}${Capitalize<Camel<B>>}` : S;

/** `holed`: what a rule sees while there may be errors; `whole`: after none were found. */
export type Mode = "holed" | "whole";
export interface Placed {
  readonly span: Span;
  /** Span of each key's value, or of the whole block for a default; by the key as written. */
  readonly places: Readonly<Record<string, Span>>;
}
type Member<K extends Key, M extends Mode> = K["need"] extends "optional"
  ? Value<K["of"], M> | undefined
  : M extends "holed"
    ? Value<K["of"], M> | undefined
    : Value<K["of"], M>;
export type BlockValue<Keys extends KeySet, M extends Mode> = Placed & {
  readonly [Name in keyof Keys & string as Camel<Name>]: Member<Keys[Name], M>;
};
type VariantValue<Tag extends string, V extends VariantSet, M extends Mode> = {
  [Name in keyof V & string]: BlockValue<V[Name], M> & { readonly [T in Tag as Camel<T>]: Name };
}[keyof V & string];
export interface Named<T> {
  readonly name: string;
  readonly nameAt: Span;
  readonly value: T;
}
type ShapeValue<S extends Shapes, M extends Mode> =
  | (S["words"] extends WordKind<infer W> ? W : never)
  | (S["scalar"] extends Kind ? Value<S["scalar"], M> : never)
  | (S["list"] extends Kind ? Value<S["list"], M> : never)
  | (S["map"] extends Kind ? Value<S["map"], M> : never);

/** What reading a kind gives. */
export type Value<K extends Kind, M extends Mode> = K extends { kind: "quantity" }
  ? Quantity
  : K extends { kind: "duration" }
    ? Duration
    : K extends { kind: "range" }
      ? Range
      : K extends { kind: "free" }
        ? Free
        : K extends { kind: "tuple" }
          ? readonly Quantity[]
          : K extends WordKind<infer W>
            ? W
            : K extends { kind: "text" }
              ? string
              : K extends { kind: "reference" }
                ? Reference
                : K extends { kind: "flag" }
                  ? boolean
                  : K extends { kind: "integer" }
                    ? Quantity
                    : K extends { kind: "curve" }
                      ? CurveSpec
                      : K extends { kind: "table" }
                        ? TableSpec
                        : K extends { kind: "block"; keys: infer Keys extends KeySet }
                          ? BlockValue<Keys, M>
                          : K extends { kind: "list"; of: infer Of extends Kind }
                            ? readonly Value<Of, M>[]
                            : K extends { kind: "map"; of: infer Of extends Kind }
                              ? readonly Named<Value<Of, M>>[]
                              : K extends {
                                    kind: "variants";
                                    tag: infer T extends string;
                                    variants: infer V extends VariantSet;
                                  }
                                ? VariantValue<T, V, M>
                                : K extends { kind: "shape"; shapes: infer S extends Shapes }
                                  ? ShapeValue<S, M>
                                  : never;
