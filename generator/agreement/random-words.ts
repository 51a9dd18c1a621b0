/** A stream of 32-bit numbers from a seed, integers only: xorshift (Marsaglia 2003, from memory), seed scrambled. */
export interface RandomWords {
  /** 0 .. 2^32 - 1. */
  readonly word: () => number;
  /** 0 <= x < 1. */
  readonly fraction: () => number;
  readonly below: (limit: number) => number;
}

export const randomWords = (seed: number): RandomWords => {
  let state = (Math.imul(seed + 1, 0x9e3779b1) ^ 0x85ebca6b) >>> 0 || 1;
  const word = (): number => {
    state ^= state << 13;
    state ^= state >>> 17;
    state = (state ^ (state << 5)) >>> 0;
    return state;
  };
  const fraction = (): number => word() / 2 ** 32;
  return { word, fraction, below: (limit) => Math.floor(fraction() * limit) };
};
