import type { Diagnostic } from "../diagnostic.ts";
import { LARGEST_FILE } from "./parse.ts";
import type { Source } from "./source.ts";

export type DecodeResult =
  | { readonly source: Source; readonly diagnostics: readonly [] }
  | { readonly source?: never; readonly diagnostics: readonly [Diagnostic] };

/** A file's bytes as text, or why they are not UTF-8 text of a sensible size. */
export function decodeSource(file: string, bytes: Uint8Array): DecodeResult {
  if (bytes.length > LARGEST_FILE)
    return refuse(
      file,
      1,
      1,
      "file-too-large",
      `the file has ${bytes.length} bytes; the limit is ${LARGEST_FILE}`,
    );
  try {
    const text = new TextDecoder("utf-8", { fatal: true, ignoreBOM: true }).decode(bytes);
    return { source: { file, text }, diagnostics: [] };
  } catch {
    return refuseBytes(file, bytes);
  }
}

function refuseBytes(file: string, bytes: Uint8Array): DecodeResult {
  const bad = firstBad(bytes);
  const lines = new TextDecoder("utf-8").decode(bytes.subarray(0, bad)).split("\n");
  const byte = bytes[bad]?.toString(16).padStart(2, "0");
  const says = `byte 0x${byte} is not UTF-8 text`;
  return refuse(file, lines.length, (lines.at(-1) ?? "").length + 1, "not-utf8", says);
}

/** Index of the first byte of the first sequence that is not UTF-8. */
function firstBad(bytes: Uint8Array): number {
  let [low, high] = [0, bytes.length];
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (decodes(bytes.subarray(0, middle))) low = middle;
    else high = middle - 1;
  }
  const unfinished = [0, 1, 2, 3].find((count) => decodes(bytes.subarray(0, low - count), false));
  return low - (unfinished ?? 0);
}

/** True for valid text; `open`: it may end inside a character. */
function decodes(bytes: Uint8Array, open = true): boolean {
  try {
    new TextDecoder("utf-8", { fatal: true }).decode(bytes, { stream: open });
    return true;
  } catch {
    return false;
  }
}

function refuse(
  file: string,
  line: number,
  column: number,
  code: "file-too-large" | "not-utf8",
  message: string,
): DecodeResult {
  const at = { file, line, column, endLine: line, endColumn: column + 1 };
  const fix = code === "not-utf8" ? "save the file as UTF-8" : "check that this is the file you meant";
  return { diagnostics: [{ code, severity: "error", at, message, fix }] };
}
