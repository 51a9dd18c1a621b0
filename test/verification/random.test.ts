import { describe, expect, it } from "vitest";
import { murmurHash3, uniformOf } from "../../verification/random.ts";

const bytes = (text: string) => new TextEncoder().encode(text);

describe("the hash that starts a run's random numbers", () => {
  // Test vectors of MurmurHash3 x86_32 that circulate with its implementations (from memory).
  it.each([
    ["", 0, 0],
    ["", 1, 0x514e28b7],
    ["", 0xffffffff, 0x81f16f39],
    ["test", 0, 0xba6bd213],
    ["test", 0x9747b28c, 0x704b81dc],
    ["Hello, world!", 0, 0xc0363e43],
    ["Hello, world!", 0x9747b28c, 0x24884cba],
    ["The quick brown fox jumps over the lazy dog", 0, 0x2e4ff723],
    ["aaa", 0x9747b28c, 0x283e0130],
    ["aa", 0x9747b28c, 0x5d211726],
  ])("of %j with seed %i is as published", (text, seed, hash) => {
    expect(murmurHash3(bytes(text), seed)).toBe(hash);
  });
});

describe("uniform numbers of a run", () => {
  it("repeat for the same seed, name and index, and differ when any of them does", () => {
    const first = (seed: number, name: string, index: number) => {
      const uniform = uniformOf(seed, name, index);
      return [uniform(), uniform(), uniform()];
    };
    expect(first(1, "tip_in", 7)).toEqual(first(1, "tip_in", 7));
    const others = [first(2, "tip_in", 7), first(1, "tip_out", 7), first(1, "tip_in", 8)];
    for (const other of others) expect(other).not.toEqual(first(1, "tip_in", 7));
  });

  it("fill 100 equal bins evenly across runs: chi-square below its 99.9 % point, 148.2 for 99 degrees (table)", () => {
    for (const place of [0, 1, 5]) {
      const counts = new Array<number>(100).fill(0);
      for (let index = 0; index < 20_000; index++) {
        const uniform = uniformOf(5, "steps", index);
        for (let skip = 0; skip < place; skip++) uniform();
        counts[Math.floor(100 * uniform())]++;
      }
      const chiSquare = counts.reduce((sum, count) => sum + (count - 200) ** 2 / 200, 0);
      expect(chiSquare).toBeLessThan(148.2);
      expect(chiSquare).toBeGreaterThan(50);
    }
  });

  it("neighbouring runs are uncorrelated within 4 standard errors", () => {
    const values = Array.from({ length: 20_001 }, (_, index) => uniformOf(9, "steps", index)() - 0.5);
    const product = values.slice(1).reduce((sum, value, k) => sum + value * values[k], 0);
    expect(Math.abs((12 * product) / 20_000)).toBeLessThan(4 / Math.sqrt(20_000));
  });
});
