/**
 * Independent uniform numbers for one run, from (seed, scenario name, run index) alone: the words that a run draws do
 * not depend on how many runs there are, nor on who makes them. Integer arithmetic only, so the same on every machine.
 * Sources: MurmurHash3 x86_32 (Appleby, public domain) makes the start; sfc32 (Doty-Humphrey, PractRand, public
 * domain) the sequence. Both from memory, the hash checked against published values.
 */
export type Uniform = () => number;

/** Numbers in [0, 1), multiples of 2^-32. */
export function uniformOf(seed: number, name: string, index: number): Uniform {
  const bytes = new TextEncoder().encode(`${index}:${name}`);
  let a = murmurHash3(bytes, seed);
  let b = murmurHash3(bytes, seed ^ 0x9e3779b9);
  let c = murmurHash3(bytes, ~seed);
  let counter = 1;
  const next = () => {
    const result = (a + b + counter) | 0;
    counter = (counter + 1) | 0;
    a = b ^ (b >>> 9);
    b = (c + (c << 3)) | 0;
    c = (((c << 21) | (c >>> 11)) + result) | 0;
    return (result >>> 0) / 4294967296;
  };
  for (let i = 0; i < 15; i++) next();
  return next;
}

/** MurmurHash3 x86_32 of `bytes`; unsigned 32 bit. */
export function murmurHash3(bytes: Uint8Array, seed: number): number {
  let hash = seed | 0;
  const whole = bytes.length & ~3;
  for (let i = 0; i < whole; i += 4) {
    const word = bytes[i] | (bytes[i + 1] << 8) | (bytes[i + 2] << 16) | (bytes[i + 3] << 24);
    hash = Math.imul(rotateLeft(hash ^ scramble(word), 13), 5) + 0xe6546b64;
  }
  let rest = 0;
  for (let i = bytes.length - 1; i >= whole; i--) rest = (rest << 8) | bytes[i];
  if (whole < bytes.length) hash ^= scramble(rest);
  hash ^= bytes.length;
  hash = Math.imul(hash ^ (hash >>> 16), 0x85ebca6b);
  hash = Math.imul(hash ^ (hash >>> 13), 0xc2b2ae35);
  return (hash ^ (hash >>> 16)) >>> 0;
}

function scramble(word: number): number {
  return Math.imul(rotateLeft(Math.imul(word, 0xcc9e2d51), 15), 0x1b873593);
}

function rotateLeft(word: number, bits: number): number {
  return (word << bits) | (word >>> (32 - bits));
}
