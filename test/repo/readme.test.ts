import { spawnSync } from "node:child_process";
import { chmodSync, existsSync, mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { join } from "node:path";
import { expect, test } from "vitest";
import { scratchFolder } from "../support/scratch.ts";
import { ROOT, textOf } from "./repository.ts";

const FENCE = /^```console\n([\s\S]*?)^```/gm;
const updates = (process.env.SPOOLWRIGHT_UPDATE ?? "").split(",").includes("readme");

/** A folder with `spoolwright` in it, as an installation would put it on the path. */
function installation(): string {
  const folder = scratchFolder();
  const command = join(folder, "spoolwright");
  writeFileSync(command, `#!/bin/sh\nexec "${process.execPath}" "${join(ROOT, "build/cli/main.js")}" "$@"\n`);
  chmodSync(command, 0o755);
  return folder;
}

/** What a shell shows for the commands of one fence, each behind its `$`. */
function transcript(fence: string, PATH: string): string {
  const commands = fence.split("\n").filter((line) => line.startsWith("$ "));
  return commands
    .map((line) => {
      const script = `{ ${line.slice(2)}; } 2>&1`;
      const run = spawnSync("bash", ["-c", script], {
        cwd: ROOT,
        env: { ...process.env, PATH },
        encoding: "utf8",
      });
      return `${line}\n${run.stdout}`;
    })
    .join("");
}

/** Accept what changed with: npm test -- --update readme */
test("every console line of the README prints what stands below it", () => {
  mkdirSync(join(ROOT, "out"), { recursive: true });
  const PATH = `${installation()}:${process.env.PATH}`;
  const readme = textOf("README.md");
  const fresh = readme.replace(
    FENCE,
    (_whole, fence: string) => `\`\`\`console\n${transcript(fence, PATH)}\`\`\``,
  );
  if (updates) writeFileSync(join(ROOT, "README.md"), fresh);
  expect([...readme.matchAll(FENCE)].length).toBeGreaterThan(2);
  expect(updates ? fresh : readme).toBe(fresh);
});

test("the README's picture is what its command draws", () => {
  const drawn = readFileSync(join(ROOT, "out/tip-in.svg"), "utf8");
  if (updates) writeFileSync(join(ROOT, "examples/skarn24/tip-in.svg"), drawn);
  expect(readFileSync(join(ROOT, "examples/skarn24/tip-in.svg"), "utf8") === drawn).toBe(true);
});

test("the README's pictures and links lead to files of the repository", () => {
  const links = [...textOf("README.md").matchAll(/\]\(([^)#]+)\)/g)].map((found) => found[1]);
  expect(links.length).toBeGreaterThan(2);
  for (const link of links) expect(existsSync(join(ROOT, link)), link).toBe(true);
});
