import { percentUp as percentDigits } from "../percent-up.ts";

const NARROW_SPACE = "\u202F";

/** Words for what is no number; undefined for a number. `null` is what JSON makes of NaN and Infinity. */
function wordFor(value: number | null | undefined): string | undefined {
  if (value === null || value === undefined) return "not known";
  if (Number.isNaN(value)) return "not a number";
  if (value === Infinity) return "infinite";
  if (value === -Infinity) return "minus infinite";
  return undefined;
}

function withMinus(text: string): string {
  return text.replace(/^-/, "\u2212");
}

function grouped(text: string): string {
  const [whole, fraction] = text.split(".");
  const digits = whole.replace(/^-/, "");
  const spaced = digits.length < 5 ? whole : whole.replace(/\B(?=(\d{3})+$)/g, NARROW_SPACE);
  return fraction === undefined ? spaced : `${spaced}.${fraction}`;
}

/** A count or a whole figure, thousands apart. */
export function whole(value: number): string {
  return wordFor(value) ?? withMinus(grouped(value.toFixed(0)));
}

function plainDigits(value: number, digits: number): string {
  const short = Number(value.toPrecision(digits));
  const size = Math.abs(short);
  if (size !== 0 && (size < 1e-4 || size >= 1e15)) return String(short);
  return grouped(short.toLocaleString("en-US", { useGrouping: false, maximumFractionDigits: 12 }));
}

/** `digits` significant digits, no trailing zeros; words for NaN and infinities. */
export function figure(value: number, digits = 4): string {
  return wordFor(value) ?? withMinus(plainDigits(value, digits));
}

/** A margin, three decimals rounded down, so that it never looks better than it is. */
export function margin(value: number): string {
  const word = wordFor(value);
  if (word !== undefined) return word;
  const down = Math.floor(value * 1000 + 1e-9) / 1000;
  return withMinus((down === 0 ? 0 : down).toFixed(3));
}

/** A probability in per cent, two significant digits rounded up, so that a bound is never understated. */
export function percentUp(probability: number): string {
  const word = wordFor(probability);
  if (word !== undefined) return word;
  return `${percentDigits(probability)}${NARROW_SPACE}%`;
}

/** Fixed decimals for table columns; words for NaN and infinities. */
export function decimals(value: number, places: number): string {
  return wordFor(value) ?? withMinus(grouped(value.toFixed(places)));
}
