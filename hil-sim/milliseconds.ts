/** Nearest whole milliseconds: the loop's clock. */
export function wholeMilliseconds(seconds: number): number {
  return Math.floor(seconds * 1000 + 0.5);
}
