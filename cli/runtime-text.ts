import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";

/** Where the controller's text lies: beside the build, or the folder itself when the sources run unbuilt. */
const PLACES = ["../runtime-text", "../runtime"].map((place) => join(import.meta.dirname, place));

/** Text of every runtime file, by name, in one order on every machine. */
export function runtimeText(): ReadonlyMap<string, string> {
  const folder = PLACES.find((place) => existsSync(place));
  if (folder === undefined) throw new Error("the text of the runtime is missing from this installation");
  const names = readdirSync(folder).filter((name) => name.endsWith(".ts"));
  return new Map(names.sort().map((name) => [name, readFileSync(join(folder, name), "utf8")]));
}
