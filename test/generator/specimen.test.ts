import { describe, expect, test } from "vitest";
import { OPERATOR_NAMES } from "../../generator/index.ts";
import { usedOperators } from "../../generator/print/helpers.ts";
import { specimenProgram } from "./specimen/lowered.ts";

describe("the specimen", () => {
  test("covers the operator table", () => {
    expect([...usedOperators(specimenProgram())].sort()).toEqual([...OPERATOR_NAMES].sort());
  });
});
