export interface Sample {
  readonly x: number;
  readonly y: number;
}

function finite(value: number): number {
  return Number.isFinite(value) ? value : Number.NaN;
}

/** Indices of the least, the most and one hole of a stretch, in order of time. */
function extremes(values: ArrayLike<number>, from: number, to: number): readonly number[] {
  let least = -1;
  let most = -1;
  let hole = -1;
  for (let i = from; i < to; i++) {
    if (!Number.isFinite(values[i])) hole = i;
    else {
      if (least < 0 || values[i] < values[least]) least = i;
      if (most < 0 || values[i] > values[most]) most = i;
    }
  }
  const found = [least, most, hole].filter((index) => index >= 0);
  return [...new Set(found)].sort((a, b) => a - b);
}

/**
 * At most `3 * buckets + 2` samples of a series whose line looks the same: first and last, and the least and the
 * most of each of `buckets` equal stretches (after Jugel et al. 2014, M4, from memory), so no peak is lost. A
 * value that is not finite becomes NaN, which breaks the line.
 */
export function thinOut(values: ArrayLike<number>, length: number, step: number, buckets: number): Sample[] {
  const indices: number[] = [];
  if (length <= 2 * buckets) for (let i = 0; i < length; i++) indices.push(i);
  else {
    indices.push(0);
    for (let bucket = 0; bucket < buckets; bucket++) {
      const from = Math.max(1, Math.floor((bucket * length) / buckets));
      const to = Math.min(length - 1, Math.floor(((bucket + 1) * length) / buckets));
      if (to > from) indices.push(...extremes(values, from, to));
    }
    indices.push(length - 1);
  }
  return indices.map((i) => ({ x: i * step, y: finite(values[i]) }));
}

/** Drops samples in the middle of a level stretch; a step keeps both its corners. */
export function dropLevel(samples: readonly Sample[]): Sample[] {
  return samples.filter((sample, i) => {
    const before = samples[i - 1];
    const after = samples[i + 1];
    return before === undefined || after === undefined || !(before.y === sample.y && sample.y === after.y);
  });
}
