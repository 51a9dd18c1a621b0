import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { useParsedRuntime } from "../generator/index.ts";

/** Where the controller's text lies: beside the build, or the folder itself when the sources run unbuilt. */
const PLACES = ["../runtime-text", "../runtime"].map((place) => join(import.meta.dirname, place));

/** Text of every runtime file, by name, in one order on every machine; parsed already where the build has done it. */
export function runtimeText(): ReadonlyMap<string, string> {
  const folder = PLACES.find((place) => existsSync(place));
  if (folder === undefined) throw new Error("the text of the runtime is missing from this installation");
  const names = readdirSync(folder).filter((name) => name.endsWith(".ts"));
  const runtime = new Map(names.sort().map((name) => [name, readFileSync(join(folder, name), "utf8")]));
  const parsed = join(folder, "parsed.json");
  if (existsSync(parsed)) useParsedRuntime(runtime, readFileSync(parsed, "utf8"));
  return runtime;
}
