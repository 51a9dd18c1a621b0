import { LONGEST_LIST } from "../read/read-numbers.ts";
import type {
  Axes,
  Key,
  KeySet,
  Kind,
  Limits,
  Shapes,
  TupleKind,
  UnitChoice,
  VariantsKind,
} from "../table/kind.ts";

export type Schema = { readonly [key: string]: unknown };

/** Hands out `$ref`s for kinds that appear several times. */
export interface Definitions {
  readonly refer: (kind: Kind, path: string, make: () => Schema) => Schema;
}

const NUMBER = "[+-]?(\\d+(\\.\\d*)?|\\.\\d+)([eE][+-]?\\d+)?";
const AMOUNT = `${NUMBER}\\s*[A-Za-z%(1]\\S*( abs| gauge)?`;

const isBare = (unit: UnitChoice): boolean =>
  unit.base.text === "" && (unit.shown === "" || unit.shown === "%");
const shownUnits = (units: readonly UnitChoice[]): string =>
  [...new Set(units.map(({ shown }) => shown || "a plain number"))].join(" or ");

function limitsText(limits: Limits): string {
  const words = { above: "above", atLeast: "at least", below: "below", atMost: "at most" } as const;
  const parts = (Object.keys(limits) as (keyof Limits)[]).map((name) => `${words[name]} ${limits[name]}`);
  return parts.length === 0 ? "" : `; ${parts.join(", ")}`;
}

const inUnits = (units: readonly UnitChoice[], limits: Limits): string =>
  `in ${shownUnits(units)}${limitsText(limits)}`;

/** Shapes that many keys share. A number with its unit is text to YAML. */
export const SHARED: Schema = {
  amount: { type: "string", pattern: `^\\s*${AMOUNT}\\s*$` },
  number_or_amount: { anyOf: [{ type: "number" }, { $ref: "#/$defs/amount" }] },
  range: { type: "string", pattern: "^\\s*\\S.*\\sto\\s.*\\S\\s*$" },
  between: { type: "string", pattern: "^\\s*between\\s.*\\sand\\s.*$" },
  numbers: { type: "array", items: { type: "number" }, minItems: 1, maxItems: LONGEST_LIST },
};
const shared = (name: string): Schema => ({ $ref: `#/$defs/${name}` });

/** A plain number may stand alone where a unit is not needed. */
const amountSchema = (units: readonly UnitChoice[], limits: Limits): Schema => ({
  ...shared(units.some(isBare) ? "number_or_amount" : "amount"),
  description: inUnits(units, limits),
});

function axisSchema(axes: Axes): Schema {
  const names = Object.keys(axes);
  return {
    oneOf: names.map((name) => ({
      type: "object",
      properties: {
        [name]: { ...shared("numbers"), description: `in ${axes[name].shown || "plain numbers"}` },
        unit: { type: "string" },
      },
      required: [name],
      additionalProperties: false,
    })),
  };
}

function curveSchema(
  axes: Readonly<Record<string, Axes>>,
  units: readonly UnitChoice[],
  values: Schema,
): Schema {
  const properties = Object.fromEntries(Object.entries(axes).map(([name, of]) => [name, axisSchema(of)]));
  return {
    type: "object",
    properties: { ...properties, unit: { type: "string", description: shownUnits(units) }, values },
    required: [...Object.keys(axes), "values"],
    additionalProperties: false,
  };
}

function tupleSchema(kind: TupleKind): Schema {
  const count = kind.elements.length;
  return {
    type: "array",
    prefixItems: kind.elements.map(({ units, limits }) => amountSchema(units, limits)),
    minItems: count,
    maxItems: count,
  };
}

const textSchema = (form: "identifier" | "sentence" | "path"): Schema =>
  form === "identifier" ? { type: "string", pattern: "^[a-z][a-z0-9_]{0,39}$" } : { type: "string" };

function keySchema(key: Key, path: string, definitions: Definitions): Schema {
  const inner = kindSchema(key.of, path, definitions);
  const unit = typeof inner.description === "string" ? ` (${inner.description})` : "";
  const usual = key.standard === undefined || key.standard === "{}" ? {} : { default: key.standard };
  const role = key.structural ? "; shapes the code" : "";
  return { ...inner, description: `${key.description}${unit}${role}`, examples: [key.example], ...usual };
}

function blockSchema(
  keys: KeySet,
  path: string,
  definitions: Definitions,
  oneOf?: readonly string[],
): Schema {
  const names = Object.keys(keys);
  return {
    type: "object",
    properties: Object.fromEntries(
      names.map((name) => [name, keySchema(keys[name], `${path}_${name}`, definitions)]),
    ),
    required: names.filter((name) => keys[name].need === "required"),
    additionalProperties: false,
    ...(oneOf === undefined ? {} : { oneOf: oneOf.map((name) => ({ required: [name] })) }),
  };
}

/** Variants with the same keys are described together. */
function variantsSchema(kind: VariantsKind, path: string, definitions: Definitions): Schema {
  const words = Object.keys(kind.variants);
  const groups = [...new Set(Object.values(kind.variants))].map((keys) => ({
    keys,
    words: words.filter((word) => kind.variants[word] === keys),
  }));
  return {
    type: "object",
    required: [kind.tag],
    oneOf: groups.map(({ keys, words: own }) => {
      const inner = blockSchema(keys, `${path}_${own[0]}`, definitions);
      const tag = { enum: own, description: kind.description };
      return {
        ...inner,
        properties: { [kind.tag]: tag, ...(inner.properties as Schema) },
        required: [kind.tag, ...(inner.required as readonly string[])],
      };
    }),
  };
}

function shapeSchema(shapes: Shapes, path: string, definitions: Definitions): Schema {
  const given = [shapes.words, shapes.scalar, shapes.list, shapes.map].filter((each) => each !== undefined);
  return { anyOf: given.map((each) => kindSchema(each, path, definitions)) };
}

/** The schema of one kind of the table. It may accept what the reader refuses (units, limits, rules), never the reverse. */
export function kindSchema(kind: Kind, path: string, definitions: Definitions): Schema {
  switch (kind.kind) {
    case "quantity":
    case "duration":
      return amountSchema(kind.units, kind.limits);
    case "range":
      return { ...shared("range"), description: inUnits(kind.units, kind.limits) };
    case "free":
      return {
        anyOf: [shared(kind.units.some(isBare) ? "number_or_amount" : "amount"), shared("between")],
        description: inUnits(kind.units, kind.limits),
      };
    case "tuple":
      return tupleSchema(kind);
    case "word":
      return { enum: kind.words };
    case "text":
      return textSchema(kind.form);
    case "reference":
      return { type: "string" };
    case "flag":
      return { type: "boolean" };
    case "integer":
      return { type: "integer", minimum: kind.least, maximum: kind.most };
    case "curve":
      return curveSchema({ over: kind.over }, kind.units, shared("numbers"));
    case "table":
      return curveSchema({ rows: kind.rows, columns: kind.columns }, kind.units, {
        type: "array",
        items: shared("numbers"),
      });
    case "block":
      return definitions.refer(kind, path, () => blockSchema(kind.keys, path, definitions, kind.oneOf));
    case "list":
      return { type: "array", items: kindSchema(kind.of, `${path}_item`, definitions) };
    case "map":
      return {
        type: "object",
        propertyNames: { pattern: "^[a-z][a-z0-9_]{0,39}$" },
        additionalProperties: kindSchema(kind.of, `${path}_entry`, definitions),
      };
    case "variants":
      return definitions.refer(kind, path, () => variantsSchema(kind, path, definitions));
    case "shape":
      return shapeSchema(kind.shapes, path, definitions);
  }
}
