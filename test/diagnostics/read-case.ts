import { existsSync, readdirSync, readFileSync } from "node:fs";
import { type Diagnostic, decodeSource, readLoopSpec, type Source } from "../../spec/index.ts";

// A case is a folder: loop.yaml, expected.txt, and at need
//   plant-edit.txt  pairs of lines, old and new, applied to the plant of test/spec/files: then ./engine.plant.yaml is there
//   padding.txt     a number of bytes: the file is filled up with a comment to that size
export const CASES = new URL("./cases/", import.meta.url);
const PLANT = new URL("../spec/files/engine.plant.yaml", import.meta.url);

export const caseNames = (): readonly string[] => readdirSync(CASES).sort();

export interface CaseResult {
  readonly diagnostics: readonly Diagnostic[];
  readonly sources: readonly Source[];
  readonly accepted: boolean;
}

/** Reads a case; `text` stands in for its loop.yaml. */
export function readCase(name: string, text?: string): CaseResult {
  const folder = new URL(`${name}/`, CASES);
  const decoded = decodeSource("loop.yaml", bytesOf(folder, text));
  if (decoded.source === undefined) return { diagnostics: decoded.diagnostics, sources: [], accepted: false };
  const plant = plantOf(folder);
  const open = (path: string) => (path === "./engine.plant.yaml" ? plant : undefined);
  const { diagnostics, spec } = readLoopSpec(decoded.source, open);
  const sources = [decoded.source, ...(plant === undefined ? [] : [plant])];
  return { diagnostics, sources, accepted: spec !== undefined };
}

const bytesOf = (folder: URL, text: string | undefined): Uint8Array =>
  text === undefined
    ? padded(folder, readFileSync(new URL("loop.yaml", folder)))
    : new TextEncoder().encode(text);

function padded(folder: URL, bytes: Buffer): Uint8Array {
  const file = new URL("padding.txt", folder);
  if (!existsSync(file)) return bytes;
  const size = Number(readFileSync(file, "utf8"));
  return Buffer.concat([bytes, Buffer.alloc(size - bytes.length, "#")]);
}

function plantOf(folder: URL): Source | undefined {
  const file = new URL("plant-edit.txt", folder);
  if (!existsSync(file)) return undefined;
  const lines = readFileSync(file, "utf8").split("\n");
  let text = readFileSync(PLANT, "utf8");
  for (let i = 0; i + 1 < lines.length; i += 2) {
    if (!text.includes(lines[i])) throw new Error(`the plant has no line with: ${lines[i]}`);
    text = text.replace(lines[i], lines[i + 1]);
  }
  return { file: "engine.plant.yaml", text };
}
