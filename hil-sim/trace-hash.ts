import type { TraceSignal } from "../spec/index.ts";
import type { Trace } from "./trace.ts";

const OFFSET = 0x811c9dc5;
const PRIME = 0x01000193;
const ONE_NAN = 0x7ff8000000000000n;

/**
 * 32-bit hash of a trace's bits, eight hexadecimal digits: equal on every machine for equal runs.
 * Every NaN counts as one. source: FNV-1a, Fowler, Noll & Vo, draft-eastlake-fnv (from memory)
 */
export function traceHash(trace: Trace): string {
  let hash = OFFSET;
  for (const signal of Object.keys(trace.signals).sort() as TraceSignal[]) {
    const samples = trace.signals[signal];
    if (samples !== undefined) hash = hashSamples(hash, samples, trace.length);
  }
  if (trace.mode !== undefined) {
    for (let k = 0; k < trace.length; k++) hash = hashByte(hash, trace.mode[k]);
  }
  return (hash >>> 0).toString(16).padStart(8, "0");
}

function hashSamples(start: number, samples: Float64Array, length: number): number {
  const view = new DataView(new ArrayBuffer(8));
  let hash = start;
  for (let k = 0; k < length; k++) {
    view.setFloat64(0, samples[k]);
    if (Number.isNaN(samples[k])) view.setBigUint64(0, ONE_NAN);
    for (let byte = 0; byte < 8; byte++) hash = hashByte(hash, view.getUint8(byte));
  }
  return hash;
}

function hashByte(hash: number, byte: number): number {
  return Math.imul(hash ^ byte, PRIME);
}
