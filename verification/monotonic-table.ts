/**
 * Openings row after row, rows over rising pressure and columns over rising engine speed, made monotonic: more pressure
 * never asks for a more open gate, then more engine speed never for a more closed one.
 */
export function monotonicTable(openings: readonly number[], columns: number): number[] {
  const result = [...openings];
  for (let i = columns; i < result.length; i++) result[i] = Math.min(result[i], result[i - columns]);
  for (let i = 0; i < result.length; i++) {
    if (i % columns > 0) result[i] = Math.max(result[i], result[i - 1]);
  }
  return result;
}
