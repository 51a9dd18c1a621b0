import { closeSync, constants, fstatSync, openSync, readSync } from "node:fs";

/** Specs, plants and counterexamples; the reader states the same limit. */
export const SPEC_LIMIT_BYTES = 2 * 1024 * 1024;
/** Logs and evidence. */
export const DATA_LIMIT_BYTES = 256 * 1024 * 1024;

export type ReadProblem = "missing" | "directory" | "not_a_file" | "too_large" | "unreadable";
export type ReadOutcome =
  | { readonly ok: true; readonly bytes: Uint8Array }
  | { readonly ok: false; readonly problem: ReadProblem };

function problemOf(error: unknown): ReadProblem {
  const code = error instanceof Error && "code" in error ? error.code : "";
  if (code === "ENOENT" || code === "ENOTDIR") return "missing";
  return code === "EISDIR" ? "directory" : "unreadable";
}

/** Reads at most `limit` bytes plus one, so that a file that grows, or a device, cannot fill the memory. */
function readOpen(file: number, limit: number): ReadOutcome {
  const status = fstatSync(file);
  if (status.isDirectory()) return { ok: false, problem: "directory" };
  if (!status.isFile()) return { ok: false, problem: "not_a_file" };
  if (status.size > limit) return { ok: false, problem: "too_large" };
  const buffer = Buffer.allocUnsafe(status.size + 1);
  let length = 0;
  for (let got = -1; got !== 0 && length < buffer.length; length += got) {
    got = readSync(file, buffer, length, buffer.length - length, null);
  }
  return length > status.size
    ? { ok: false, problem: "unreadable" }
    : { ok: true, bytes: buffer.subarray(0, length) };
}

/** The bytes of a file, or why there are none; never throws. `O_NONBLOCK` keeps a named pipe from hanging the command. */
export function readLimited(path: string, limit: number): ReadOutcome {
  let file: number | undefined;
  try {
    file = openSync(path, constants.O_RDONLY | constants.O_NONBLOCK);
    return readOpen(file, limit);
  } catch (error) {
    return { ok: false, problem: problemOf(error) };
  } finally {
    if (file !== undefined) closeSync(file);
  }
}
