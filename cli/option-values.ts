import { InvalidArgumentError } from "commander";

/** Parses an option's whole number; `1e6` is one. */
export const wholeNumber =
  (low: number, high: number) =>
  (text: string): number => {
    const value = /^\d+(\.\d+)?(e\d+)?$/.test(text) ? Number(text) : Number.NaN;
    if (Number.isInteger(value) && value >= low && value <= high) return value;
    throw new InvalidArgumentError(`expected a whole number from ${low} to ${high}.`);
  };

/** Gathers a repeatable option. */
export const collect = (text: string, before: readonly string[]): string[] => [...before, text];

/** Names separated by commas. */
export const names = (text: string): string[] => text.split(",").map((name) => name.trim());
