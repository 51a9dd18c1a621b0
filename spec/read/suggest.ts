import { distance } from "fastest-levenshtein";

/** Longest word worth comparing; keeps a hostile key from costing time. */
const LONGEST = 60;

const sortedLetters = (word: string): string => [...word].sort().join("");

/** Edit distance, where letters in another order count once. */
const apartness = (a: string, b: string): number =>
  a.length === b.length && sortedLetters(a) === sortedLetters(b) ? Number(a !== b) : distance(a, b);

/** The known name nearest to a misspelt one, if it is near enough to be meant. */
export function nearestName(written: string, known: readonly string[]): string | undefined {
  const word = written.toLowerCase().replaceAll("-", "_").slice(0, LONGEST);
  const limit = Math.max(1, Math.floor(word.length / 3));
  let best: string | undefined;
  let least = limit + 1;
  for (const name of known) {
    const apart = apartness(word, name.toLowerCase());
    if (apart < least) [best, least] = [name, apart];
  }
  return best;
}

/** `a`, `b` or `c`, each in backticks; long lists are cut. */
export function orList(names: readonly string[], most = 14): string {
  const shown = names.slice(0, most).map((name) => `\`${name}\``);
  if (names.length > most) return `${shown.join(", ")}, ...`;
  return shown.length < 2 ? shown.join("") : `${shown.slice(0, -1).join(", ")} or ${shown.at(-1)}`;
}

/** A key in backticks, a description such as `item 2 of faults` bare. */
export const shownName = (name: string): string => (name.includes(" ") ? name : `\`${name}\``);

/** `1 number`, `2 numbers`. */
export const counted = (count: number, word: string): string => `${count} ${word}${count === 1 ? "" : "s"}`;

/** The text in backticks, cut to a readable length. */
export function quote(text: string, most = 40): string {
  const oneLine = text.replace(/\s+/g, " ");
  return `\`${oneLine.length > most ? `${oneLine.slice(0, most)}...` : oneLine}\``;
}
