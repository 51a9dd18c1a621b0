import {
  array,
  assert,
  constantFrom,
  dictionary,
  integer,
  letrec,
  oneof,
  property,
  string,
} from "fast-check";
import { describe, expect, it } from "vitest";
import { parse, stringify } from "yaml";
import { placeInSpec, type SpecValue, setInSpec } from "../../verification/set-in-spec.ts";

const key = () => constantFrom("a", "b", "target", "gain", "over");
const { value } = letrec<{ value: SpecValue }>((tie) => ({
  value: oneof(
    { maxDepth: 3 },
    integer(),
    string({ maxLength: 6 }),
    array(tie("value"), { maxLength: 3 }),
    dictionary(key(), tie("value"), { maxKeys: 3, noNullPrototype: true }),
  ),
}));
const tree = () => dictionary(key(), value, { minKeys: 2, noNullPrototype: true });
const style = () => constantFrom<"block" | "flow">("block", "flow");

const SPEC = `# head
controller:
  step: 5 ms        # structural
  feedback:
    # gains
    proportional: 1481 mm2
    anti_windup: { method: conditional, band: 10 % } # keep
    values:
      - [1, 2]
      - [3, 4] # last
  # guard below
  overspeed_guard:
    limit: 165000 rpm
    trip: {after: 2 ms}

requirements:
  - id: one
    says: first
  - id: two
scenarios:
`;

describe("setting a value in a spec", () => {
  it("gives the same data as setting it in the data, whatever the style", () => {
    assert(
      property(tree(), value, style(), (data, item, collectionStyle) => {
        const text = stringify(data, { collectionStyle });
        for (const name of [...Object.keys(data), "fresh"]) {
          expect(parse(setInSpec(text, name, item))).toEqual({ ...data, [name]: item });
        }
      }),
      { seed: 13 },
    );
  });

  it("taking a value out leaves the others", () => {
    assert(
      property(tree(), style(), (data, collectionStyle) => {
        const text = stringify(data, { collectionStyle });
        for (const name of Object.keys(data)) {
          const rest = { ...data };
          delete rest[name];
          expect(parse(setInSpec(text, name, undefined))).toEqual(rest);
        }
      }),
      { seed: 14 },
    );
  });

  it.each<[string, SpecValue | undefined, string, string]>([
    ["controller.feedback.proportional", "4443 mm2", "proportional: 1481 mm2", "proportional: 4443 mm2"],
    [
      "controller.feedback.anti_windup",
      { method: "none" },
      "{ method: conditional, band: 10 % }",
      "{method: none}",
    ],
    [
      "controller.feedback.values",
      [[5, 6.5], [7], [8]],
      "- [1, 2]\n      - [3, 4] # last",
      "- [5, 6.5]\n      - [7]\n      - [8] # last",
    ],
    ["controller.overspeed_guard.trip", null, "trip: {after: 2 ms}", "trip: null"],
    [
      "controller.overspeed_guard",
      null,
      "overspeed_guard:\n    limit: 165000 rpm\n    trip: {after: 2 ms}\n",
      "overspeed_guard:\n    null\n",
    ],
    ["requirements[0].says", "two\nlines", "says: first", 'says: "two\\nlines"'],
    ["controller.overspeed_guard.trip.after", "50 ms", "{after: 2 ms}", "{after: 50 ms}"],
    ["controller.overspeed_guard.trip.torque", "40 %", "{after: 2 ms}", "{after: 2 ms, torque: 40 %}"],
    ["controller.feedback.integral", "1 mm2/s", "# last\n", "# last\n    integral: 1 mm2/s\n"],
    ["requirements[0].says", "other", "says: first", "says: other"],
    ["requirements[0].says", undefined, "    says: first\n", ""],
    ["scenarios", { a: 1 }, "scenarios:\n", "scenarios: {a: 1}\n"],
    [
      "controller.overspeed_guard",
      undefined,
      "  overspeed_guard:\n    limit: 165000 rpm\n    trip: {after: 2 ms}\n",
      "",
    ],
  ])("%s to %j changes these bytes and no others", (path, item, before, after) => {
    expect(SPEC.split(before)).toHaveLength(2);
    expect(setInSpec(SPEC, path, item)).toBe(SPEC.replace(before, after));
  });

  it("names a path whose parent does not exist", () => {
    expect(() => setInSpec(SPEC, "controller.nowhere.gain", 1)).toThrow("controller.nowhere.gain");
  });

  it("finds what it has set, with its key", () => {
    const found = (path: string, text = SPEC): string | undefined => {
      const place = placeInSpec(text, path);
      return place && text.slice(...place);
    };
    expect(found("controller.overspeed_guard.trip.after")).toBe("after: 2 ms");
    expect(found("requirements[1].id")).toBe("id: two");
    expect(found("fresh", setInSpec(SPEC, "fresh", [1, 2]))).toBe("fresh: [1, 2]");
    expect(found("controller.nowhere.gain")).toBeUndefined();
    expect(found("controller.gain")).toBeUndefined();
    expect(found("a", "a: [")).toBeUndefined();
  });
});
