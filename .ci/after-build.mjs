// What the compiler does not copy: the text of runtime/, which the generator reads, the JSON Schema, and the
// executable bit of the command line.
import {
  chmodSync,
  cpSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmSync,
  writeFileSync,
} from "node:fs";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { root } from "./prepare.mjs";

const build = join(root, "build");

function copyRuntimeText() {
  const from = join(root, "runtime");
  const to = join(build, "runtime-text");
  mkdirSync(to, { recursive: true });
  const names = existsSync(from) ? readdirSync(from).filter((name) => name.endsWith(".ts")) : [];
  for (const stale of readdirSync(to)) if (!names.includes(stale)) rmSync(join(to, stale));
  for (const name of names) cpSync(join(from, name), join(to, name));
}

function copySchema() {
  const from = join(root, "spec/spoolwright.schema.json");
  if (existsSync(from)) cpSync(from, join(build, "spec/spoolwright.schema.json"));
}

/** The parsed runtime beside its text, so that `generate` need not load the TypeScript compiler. */
async function packRuntimeText() {
  const folder = join(build, "runtime-text");
  const { packRuntime } = await import(pathToFileURL(join(build, "generator/index.js")).href);
  const names = readdirSync(folder).filter((name) => name.endsWith(".ts"));
  const texts = names.sort().map((name) => [name, readFileSync(join(folder, name), "utf8")]);
  writeFileSync(join(folder, "parsed.json"), packRuntime(new Map(texts)));
}

copyRuntimeText();
copySchema();
await packRuntimeText();
chmodSync(join(build, "cli/main.js"), 0o755);
