import { readFileSync } from "node:fs";
import { join } from "node:path";

/** From the package file beside `build/`, or beside the sources. */
function packageVersion(): string {
  for (const place of ["../package.json", "../../package.json"]) {
    try {
      const { name, version } = JSON.parse(readFileSync(join(import.meta.dirname, place), "utf8"));
      if (name === "spoolwright") return String(version);
    } catch {
      // Not there: the next place is tried.
    }
  }
  return "unknown";
}

export const VERSION = packageVersion();
