import { existsSync, readdirSync, readFileSync } from "node:fs";
import { join, relative } from "node:path";

export const ROOT = join(import.meta.dirname, "../..");
export const FOLDERS = ["spec", "runtime", "generator", "hil-sim", "verification", "cli"] as const;

const SKIPPED = new Set(["node_modules", "build", "out", ".git"]);

/** Every file under a folder of the repository, as paths from its root with forward slashes. */
export function filesUnder(folder: string): string[] {
  const walk = (path: string): string[] =>
    readdirSync(path, { withFileTypes: true }).flatMap((entry) => {
      if (SKIPPED.has(entry.name)) return [];
      const full = join(path, entry.name);
      return entry.isDirectory() ? walk(full) : [full];
    });
  if (!existsSync(join(ROOT, folder))) return [];
  return walk(join(ROOT, folder)).map((path) => relative(ROOT, path).replaceAll("\\", "/"));
}

export const textOf = (path: string): string => readFileSync(join(ROOT, path), "utf8");

export const sourcesUnder = (folder: string): string[] =>
  filesUnder(folder).filter((path) => path.endsWith(".ts"));

export const withoutComments = (text: string): string =>
  text.replace(/\/\*[\s\S]*?\*\//g, "").replace(/^\s*\/\/.*$/gm, "");
