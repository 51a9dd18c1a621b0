// Seeded mutations of spec texts: structure-aware (words, lines, values) and byte-level.
export type Random = () => number;

/** xorshift32: small, seedable, the same everywhere; 0 <= value < 1. */
export function randomFrom(seed: number): Random {
  let state = (seed ^ 0x9e3779b9) >>> 0 || 1;
  return () => {
    state ^= state << 13;
    state >>>= 0;
    state ^= state >>> 17;
    state ^= state << 5;
    state >>>= 0;
    return state / 2 ** 32;
  };
}

const below = (random: Random, count: number): number => Math.floor(random() * count);
const pick = <T>(random: Random, all: readonly T[]): T => all[below(random, all.length)];

const VALUES = [
  "",
  "0",
  "-1",
  "1e308",
  "1e-320",
  "1e99999",
  ".inf",
  ".nan",
  "-0",
  "5",
  "5 ms",
  "5 ms to 6 ms",
  "6 ms to 5 ms",
  "between 1 s and 2 s",
  "between 2 s and 1 s",
  "200 kPa",
  "200 kPa abs",
  "100 kPa gauge",
  "25 degC",
  "25 °C",
  "3 mm2/krpm",
  "1 W/degC",
  "%",
  '"%"',
  "yes",
  "off",
  "null",
  "~",
  "[]",
  "{}",
  "[1, 2, 3]",
  "{ a: b }",
  "*a",
  "&a 1",
  "!tag x",
  "'",
  '"',
  "|",
  ">",
  "165,000 rpm",
  "a: b",
  "{{{{",
  "]]",
  "\t",
  "\u202e",
  "\ufeff",
  "\u0000",
  "💥",
  "0x10",
  "1_000",
  "abs",
  "gauge",
  "to",
  "between and",
  "# x",
  "<<",
  "__proto__",
  "constructor",
  "toString",
  "---",
  "...",
];

type Mutation = (text: string, random: Random) => string;

function replaceLine(text: string, random: Random, change: (line: string) => string): string {
  const lines = text.split("\n");
  const at = below(random, lines.length);
  lines[at] = change(lines[at]);
  return lines.join("\n");
}

const splice = (text: string, at: number, cut: number, insert: string): string =>
  text.slice(0, at) + insert + text.slice(at + cut);

const MUTATIONS: readonly Mutation[] = [
  // a value after a colon, or an element of a list
  (text, random) =>
    replaceLine(text, random, (line) => line.replace(/(: *|[[,] *)[^,:{}[\]]+/, `$1${pick(random, VALUES)}`)),
  // any word becomes any other word of the file
  (text, random) => {
    const words = text.match(/[A-Za-z_0-9.%]+/g) ?? ["x"];
    const [from, to] = [pick(random, words), pick(random, words)];
    return text.replace(from, to);
  },
  (text, random) => replaceLine(text, random, () => ""),
  (text, random) => replaceLine(text, random, (line) => `${line}\n${line}`),
  (text, random) => replaceLine(text, random, (line) => ` ${line}`),
  (text, random) => replaceLine(text, random, (line) => line.replace(/^ /, "")),
  (text, random) => replaceLine(text, random, (line) => line.replace(/^ +/, "\t")),
  (text, random) =>
    replaceLine(text, random, (line) => line.replace(/[A-Za-z_]+:/, `${pick(random, VALUES)}:`)),
  (text, random) => {
    const lines = text.split("\n");
    const [a, b] = [below(random, lines.length), below(random, lines.length)];
    [lines[a], lines[b]] = [lines[b], lines[a]];
    return lines.join("\n");
  },
  (text, random) => text.slice(0, below(random, text.length)),
  (text, random) => splice(text, below(random, text.length), 0, pick(random, VALUES)),
  (text, random) => splice(text, below(random, text.length), 1 + below(random, 8), ""),
  (text, random) => splice(text, below(random, text.length), 1, String.fromCharCode(below(random, 0x250))),
  (text) => text.replaceAll("\n", "\r\n"),
  (text, random) => text.replace(/\d+(\.\d+)?/, () => String((random() - 0.5) * 10 ** below(random, 40))),
];

/** One mutation, or up to four, decided by the seed alone. */
export function mutate(text: string, seed: number): string {
  const random = randomFrom(seed);
  let mutated = text;
  for (let left = random() < 0.6 ? 1 : 1 + below(random, 4); left > 0; left -= 1)
    mutated = pick(random, MUTATIONS)(mutated, random);
  return mutated;
}

/** Flips, drops or doubles some bytes. */
export function mutateBytes(bytes: Uint8Array, seed: number): Uint8Array {
  const random = randomFrom(seed);
  const mutated = Uint8Array.from(bytes);
  for (let left = 1 + below(random, 6); left > 0; left -= 1)
    mutated[below(random, mutated.length)] = below(random, 256);
  return random() < 0.3 ? mutated.subarray(0, below(random, mutated.length)) : mutated;
}
