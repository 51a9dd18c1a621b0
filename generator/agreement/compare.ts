import type { Layout } from "../layout/layout.ts";
import { type FrameLayout, frameLayout } from "./frames.ts";
import { type Recording, recordingWords } from "./run-module.ts";
import { viewWords } from "./word-buffer.ts";

/** The first place where two targets part. */
export interface Difference {
  /** `check`, `init`, `steps run`, or the frame's number. */
  readonly frame: string;
  readonly signal: string;
  readonly expected: string;
  readonly got: string;
}

const hexWord = (bytes: Uint8Array, index: number, wordBytes: number): string =>
  `0x${[...bytes.subarray(index * wordBytes, (index + 1) * wordBytes)]
    .reverse()
    .map((byte) => byte.toString(16).padStart(2, "0"))
    .join("")}`;

/** Bytes of a target's recording against the reference's: undefined when every bit agrees and every step was run. */
export const firstDifference = (
  layout: Layout,
  frames: number,
  reference: Recording,
  got: Uint8Array,
): Difference | undefined => {
  const { dump, wordBytes } = frameLayout(layout);
  const expected = reference.words.bytes;
  const words = recordingWords(frameLayout(layout), frames);
  if (got.byteLength !== words * wordBytes) {
    return {
      frame: "all",
      signal: "length of the recording",
      expected: `${words * wordBytes} bytes`,
      got: `${got.byteLength} bytes`,
    };
  }
  if (Buffer.compare(expected, got) === 0) {
    return undefined;
  }
  const aligned = viewWords(Uint8Array.from(got), wordBytes);
  const index =
    Array.from({ length: words }, (_, i) => i).find(
      (i) => hexWord(expected, i, wordBytes) !== hexWord(got, i, wordBytes),
    ) ?? 0;
  const inDump = index - 1;
  const frame = Math.floor(inDump / dump.length) - 1;
  const isCount = index >= words - 2;
  const word = dump[inDump % dump.length];
  const describe = (bytes: Uint8Array, real: number) => `${hexWord(bytes, index, wordBytes)} (${real})`;
  return {
    frame: index === 0 ? "check" : isCount ? "steps run" : frame < 0 ? "init" : `frame ${frame}`,
    signal: index === 0 || isCount ? "whole number" : `${word.struct}.${word.path.printed.join(".")}`,
    expected: describe(expected, reference.words.real(index)),
    got: describe(got, aligned.real(index)),
  };
};

/** Steps that a target says it ran, from the end of its recording. */
export const recordedSteps = (
  layout: FrameLayout,
  bytes: Uint8Array,
): { readonly fastSteps: number; readonly slowSteps: number } => {
  const words = bytes.byteLength / layout.wordBytes;
  const counts = viewWords(Uint8Array.from(bytes.subarray((words - 2) * layout.wordBytes)), layout.wordBytes);
  return { fastSteps: counts.whole(0), slowSteps: counts.whole(1) };
};
