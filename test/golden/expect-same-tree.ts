import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { expect } from "vitest";

const updated = (name: string): boolean => (process.env.SPOOLWRIGHT_UPDATE ?? "").split(",").includes(name);

const write = (folder: string, files: ReadonlyMap<string, string>): void => {
  rmSync(folder, { recursive: true, force: true });
  mkdirSync(folder, { recursive: true });
  for (const [name, text] of files) {
    writeFileSync(join(folder, name), text);
  }
};

/** Files that must equal those of the committed case: same names, same bytes. `--update NAME` accepts one case. */
export const expectSameTree = (name: string, files: ReadonlyMap<string, string>): void => {
  const folder = join(import.meta.dirname, name);
  if (updated(name)) {
    write(folder, files);
  }
  const hint = `accept with: npm test -- --update ${name}`;
  const committed = existsSync(folder) ? readdirSync(folder).sort() : [];
  expect([...files.keys()].sort(), `files of the case; ${hint}`).toEqual(committed);
  for (const file of committed) {
    expect(files.get(file), `${file}; ${hint}`).toBe(readFileSync(join(folder, file), "utf8"));
  }
};
