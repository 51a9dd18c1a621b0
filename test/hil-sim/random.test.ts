import { describe, expect, test } from "vitest";
import { nextBits, nextNormal, nextUniform, normalSource, randomStream } from "../../hil-sim/random.ts";

/** xoshiro128** written a second time with BigInt arithmetic, from its published description (from memory). */
function* independently(seed: Int32Array): Generator<number> {
  const word = (x: bigint) => x & 0xffffffffn;
  const rotated = (x: bigint, k: bigint) => word((x << k) | (x >> (32n - k)));
  const s = [...seed].map((x) => BigInt(x >>> 0));
  for (;;) {
    const result = word(rotated(word(s[1] * 5n), 7n) * 9n);
    const t = word(s[1] << 9n);
    s[2] ^= s[0];
    s[3] ^= s[1];
    s[1] ^= s[2];
    s[0] ^= s[3];
    s[2] ^= t;
    s[3] = rotated(s[3], 11n);
    yield Number(result);
  }
}

test("the generator gives the same words as an independent form of it", () => {
  const state = Int32Array.of(1, 2, 3, 4);
  const other = independently(Int32Array.of(1, 2, 3, 4));
  for (let i = 0; i < 10_000; i++) expect(nextBits(state) >>> 0).toBe(other.next().value);
});

test("the first words from state 1, 2, 3, 4 are the published ones", () => {
  // Source: test vector of a general-purpose random number library for xoshiro128** (from memory): 11520, 0, 5927040.
  const state = Int32Array.of(1, 2, 3, 4);
  expect([nextBits(state), nextBits(state), nextBits(state)]).toEqual([11520, 0, 5927040]);
});

describe("streams", () => {
  test("repeat for an equal seed and index, differ for another", () => {
    const first = (seed: number, index: number) => nextBits(randomStream(seed, index));
    expect(first(7, 3)).toBe(first(7, 3));
    const seen = new Set<number>();
    for (let seed = 0; seed < 100; seed++)
      for (let index = 0; index < 100; index++) seen.add(first(seed, index));
    expect(seen.size).toBeGreaterThan(9_990);
  });

  test("are uniform: chi-square over 64 bins within the 99.9 % band", () => {
    // Source: chi-square with 63 degrees of freedom, 0.999 quantile 103.4 (tables of the distribution, from memory).
    const state = randomStream(42, 0);
    const bins = new Array<number>(64).fill(0);
    const n = 640_000;
    for (let i = 0; i < n; i++) bins[Math.floor(nextUniform(state) * 64)] += 1;
    const chiSquare = bins.reduce((sum, count) => sum + (count - n / 64) ** 2 / (n / 64), 0);
    expect(chiSquare).toBeLessThan(103.4);
    expect(chiSquare).toBeGreaterThan(30);
  });
});

describe("normal deviates", () => {
  const n = 1_000_000;
  const source = normalSource(randomStream(1, 0));
  const sorted = Float64Array.from({ length: n }, () => nextNormal(source)).sort();

  test("have mean 0, variance 1, and stay inside 6", () => {
    const mean = sorted.reduce((sum, x) => sum + x, 0) / n;
    const variance = sorted.reduce((sum, x) => sum + x * x, 0) / n;
    expect(Math.abs(mean)).toBeLessThan(0.004);
    expect(Math.abs(variance - 1)).toBeLessThan(0.006);
    expect(Math.max(-sorted[0], sorted[n - 1])).toBeLessThan(6);
  });

  // Source: distribution function of the normal, standard tables: F(0.5) 0.69146, F(1) 0.84134, F(2) 0.97725, F(3) 0.99865.
  test.each([
    [0, 0.5],
    [0.5, 0.69146],
    [1, 0.84134],
    [2, 0.97725],
    [3, 0.99865],
  ])("lie below %d with the tables' probability within 0.003", (x, probability) => {
    let below = 0;
    while (below < n && sorted[below] < x) below += 1;
    expect(Math.abs(below / n - probability)).toBeLessThan(0.003);
  });
});
