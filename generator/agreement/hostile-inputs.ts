import type { FrameLayout, Word } from "./frames.ts";
import { RUN_FAST, RUN_SLOW } from "./frames.ts";
import { type RandomWords, randomWords } from "./random-words.ts";
import { newWords, type WordBuffer } from "./word-buffer.ts";

/** Where a realistic value of an input lies, by the unit at the end of its name. */
const SCALES: readonly (readonly [suffix: string, low: number, high: number])[] = [
  ["TurboSpeedRpm", 0, 200_000],
  ["Rpm", 500, 8000],
  ["Ratio", 0, 1],
  ["AmbientPressureKpa", 60, 108],
  ["Kpa", 80, 320],
  ["K", 240, 420],
];

const scaleOf = ({ path }: Word): readonly [number, number] => {
  const name = path.runtime[path.runtime.length - 1].replace(/^./, (first) => first.toUpperCase());
  const [, low, high] = SCALES.find(([suffix]) => name.endsWith(suffix)) ?? ["", -10, 10];
  return [low, high];
};

const SPECIAL = [
  0,
  -0,
  Number.NaN,
  Number.POSITIVE_INFINITY,
  Number.NEGATIVE_INFINITY,
  2 ** -149,
  -(2 ** -149),
  2 ** -126 - 2 ** -149,
  2 ** -126,
  3.4028234663852886e38,
  -3.4028234663852886e38,
  2 ** -1074,
  2 ** -1022,
  Number.MAX_VALUE,
  2 ** 24,
  2 ** 31,
  2 ** 32,
  -(2 ** 31),
  1,
  -1,
  1e-30,
  1e30,
];

const bits = new DataView(new ArrayBuffer(8));
/** Any bit pattern, signalling NaN included. */
const anyReal = (random: RandomWords, wordBytes: 4 | 8): number => {
  bits.setUint32(0, random.word());
  bits.setUint32(4, random.word());
  return wordBytes === 4 ? bits.getFloat32(0) : bits.getFloat64(0);
};

/** How hostile a run is: shares of special values and of random bit patterns among the inputs. */
interface Manner {
  readonly special: number;
  readonly bits: number;
  /** Largest step of the realistic walk, as a part of its range. */
  readonly pace: number;
}

const MANNERS: readonly Manner[] = [
  { special: 0, bits: 0, pace: 0.01 },
  { special: 0, bits: 0, pace: 0.2 },
  { special: 0.03, bits: 0.02, pace: 0.02 },
  { special: 0.2, bits: 0.2, pace: 0.1 },
  { special: 0, bits: 1, pace: 0 },
];
/** Frames before the manner changes: long enough for debounce and filters to come to rest in between. */
const MANNER_FRAMES = 400;

export interface Frames {
  readonly count: number;
  /** Words of all frames, one after the other; each frame's first word says which steps to run. */
  readonly words: WordBuffer;
  readonly fast: number;
  readonly slow: number;
}

const pickSteps = (random: RandomWords): number => {
  const pick = random.below(20);
  return pick === 0 ? RUN_FAST : pick === 1 ? RUN_SLOW : RUN_FAST | RUN_SLOW;
};

/** Input frames from a seed: realistic walks, special values, random bit patterns; both steps in mixed order. */
export const hostileFrames = (layout: FrameLayout, seed: number, count: number): Frames => {
  const random = randomWords(seed);
  const width = 1 + layout.input.length;
  const words = newWords(width * count, layout.wordBytes);
  const scales = layout.input.map(scaleOf);
  const walk = scales.map(([low, high]) => low + (high - low) * random.fraction());
  const steps = { fast: 0, slow: 0 };
  for (let frame = 0; frame < count; frame++) {
    const manner = MANNERS[Math.floor(frame / MANNER_FRAMES + seed) % MANNERS.length];
    const run = pickSteps(random);
    steps.fast += run & RUN_FAST ? 1 : 0;
    steps.slow += run & RUN_SLOW ? 1 : 0;
    words.setWhole(frame * width, run);
    scales.forEach(([low, high], i) => {
      const moved = walk[i] + (random.fraction() * 2 - 1) * manner.pace * (high - low);
      walk[i] = moved > high ? high : moved < low ? low : moved;
      const pick = random.fraction();
      const special = SPECIAL[random.below(SPECIAL.length)];
      const value =
        pick < manner.special
          ? special
          : pick < manner.special + manner.bits
            ? anyReal(random, layout.wordBytes)
            : walk[i];
      if (layout.input[i].type.kind === "real") {
        words.setReal(frame * width + 1 + i, value);
      } else {
        words.setWhole(frame * width + 1 + i, random.below(2));
      }
    });
  }
  return { count, words, ...steps };
};

/** A calibration as specified, with a share of its words made extreme: any bits for a real, any small whole for a count. */
export const hostileCalibration = (
  layout: FrameLayout,
  given: WordBuffer,
  seed: number,
  share: number,
): WordBuffer => {
  const random = randomWords(seed ^ 0x5bd1e995);
  const words = newWords(layout.calibration.length, layout.wordBytes);
  layout.calibration.forEach(({ type }, i) => {
    const isExtreme = random.fraction() < share;
    if (type.kind === "real") {
      const extreme =
        random.below(2) === 0 ? SPECIAL[random.below(SPECIAL.length)] : anyReal(random, layout.wordBytes);
      words.setReal(i, isExtreme ? extreme : given.real(i));
    } else {
      words.setWhole(i, isExtreme && type.kind === "count" ? random.below(2000) : given.whole(i));
    }
  });
  return words;
};
