/** A row of words that holds reals and whole numbers of one width. */
export interface WordBuffer {
  readonly bytes: Uint8Array;
  readonly setReal: (index: number, value: number) => void;
  readonly setWhole: (index: number, value: number) => void;
  readonly real: (index: number) => number;
  readonly whole: (index: number) => number;
}

const QUIET_NAN_32 = 0x7fc00000;
const QUIET_NAN_64 = 0x7ff8000000000000n;

const narrow = (bytes: Uint8Array): WordBuffer => {
  const count = bytes.byteLength / 4;
  const reals = new Float32Array(bytes.buffer, bytes.byteOffset, count);
  const wholes = new Int32Array(bytes.buffer, bytes.byteOffset, count);
  return {
    bytes,
    // NaN is one class: its payload and sign are outside the contract.
    setReal: (index, value) => {
      if (Number.isNaN(value)) {
        wholes[index] = QUIET_NAN_32;
      } else {
        reals[index] = value;
      }
    },
    setWhole: (index, value) => {
      wholes[index] = value;
    },
    real: (index) => reals[index],
    whole: (index) => wholes[index],
  };
};

const wide = (bytes: Uint8Array): WordBuffer => {
  const count = bytes.byteLength / 8;
  const reals = new Float64Array(bytes.buffer, bytes.byteOffset, count);
  const wholes = new BigInt64Array(bytes.buffer, bytes.byteOffset, count);
  return {
    bytes,
    setReal: (index, value) => {
      if (Number.isNaN(value)) {
        wholes[index] = QUIET_NAN_64;
      } else {
        reals[index] = value;
      }
    },
    setWhole: (index, value) => {
      wholes[index] = BigInt(value);
    },
    real: (index) => reals[index],
    whole: (index) => Number(wholes[index]),
  };
};

/** Views bytes as words; they must be aligned. */
export const viewWords = (bytes: Uint8Array, wordBytes: 4 | 8): WordBuffer =>
  wordBytes === 4 ? narrow(bytes) : wide(bytes);

export const newWords = (count: number, wordBytes: 4 | 8): WordBuffer =>
  viewWords(new Uint8Array(count * wordBytes), wordBytes);
