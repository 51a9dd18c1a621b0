import fc from "fast-check";
import { beforeAll, describe, expect, test } from "vitest";
import { agree, prepareAgreement, type TargetResult } from "../../cli/native/agree.ts";
import { NATIVE_BUILDS } from "../../cli/native/builds.ts";
import { cannotUse } from "../support/tool.ts";
import { compileSpec, readSpec, runtimeText } from "./compile-spec.ts";
import { randomSpec } from "./random-spec.ts";

/** Frames per spec; nineteen in twenty run each step, so each step runs well over 5 000 times. */
const FRAMES = 6000;
const LEAST_STEPS = 5000;
/** Shares of calibration values made extreme, in turn. */
const EXTREME = [0, 0.05, 0.5];
const MINUTES = 60_000;

interface SpecResult {
  readonly text: string;
  readonly precision: string;
  readonly results: readonly TargetResult[];
}

const runSpec = async (
  text: string,
  number: number,
  runtime: ReadonlyMap<string, string>,
): Promise<SpecResult> => {
  const builds = NATIVE_BUILDS.filter(({ compiler }) => compiler === "gcc" || !cannotUse("clang"));
  const program = compileSpec(readSpec(text), runtime);
  const subject = await prepareAgreement(program, builds);
  try {
    const run = { seed: number, frames: FRAMES, extreme: EXTREME[number % EXTREME.length] };
    return { text, precision: program.precision, results: await agree(subject, run, "interpreter") };
  } finally {
    await subject.remove();
  }
};

/** `count` random specs from a seed, each through every target; a share of the whole, so that shards run side by side. */
export const agreementShard = (seed: number, count: number): void => {
  describe(`targets agree to the bit: ${count} random specs from seed ${seed}`, () => {
    const all: SpecResult[] = [];

    beforeAll(async () => {
      const runtime = runtimeText();
      for (const [i, text] of fc.sample(randomSpec, { seed, numRuns: count }).entries()) {
        all.push(await runSpec(text, seed * 1000 + i, runtime));
      }
    }, 60 * MINUTES);

    const expectAgreement = (target: string): void => {
      expect(all).toHaveLength(count);
      for (const { text, results } of all) {
        const result = results.find((each) => each.target === target);
        const about = `${target}: ${JSON.stringify(result)}\n${text}`;
        expect(result, about).toBeDefined();
        expect(result?.difference, about).toBeUndefined();
        expect(result?.fastSteps, about).toBeGreaterThanOrEqual(LEAST_STEPS);
        expect(result?.slowSteps, about).toBeGreaterThanOrEqual(LEAST_STEPS);
      }
    };

    test("the reference interpreter ran every step", () => expectAgreement("interpreter"));
    test("generated TypeScript", () => expectAgreement("typescript"));
    for (const { name, compiler } of NATIVE_BUILDS) {
      test.skipIf(compiler === "clang" && cannotUse("clang"))(`generated C, ${name}`, () =>
        expectAgreement(name),
      );
    }
    test("both precisions took part", () => {
      expect(new Set(all.map(({ precision }) => precision))).toEqual(new Set(["float32", "float64"]));
    });
  });
};
