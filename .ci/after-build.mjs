// What the compiler does not do: copy the text of runtime/, which the generator reads, and the JSON Schema; join the
// command line into few files, since opening a hundred small ones is most of a cold start.
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
import { build as bundle } from "esbuild";
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

/** Small packages that every command loads; the others stay outside and are loaded by the command that needs them. */
const JOINED = ["commander", "fastest-levenshtein", "picocolors", "yaml"];

/** The worker's file must lie beside the code that starts it, so all goes into one flat folder. */
async function joinFiles() {
  const { dependencies } = JSON.parse(readFileSync(join(root, "package.json"), "utf8"));
  await bundle({
    entryPoints: { main: join(build, "cli/main.js"), worker: join(build, "verification/worker.js") },
    outdir: join(build, "joined"),
    bundle: true,
    splitting: true,
    format: "esm",
    platform: "node",
    target: "node20",
    external: Object.keys(dependencies).filter((name) => !JOINED.includes(name)),
    // Two of the joined packages are CommonJS and ask for node's own modules by `require`.
    banner: {
      js: 'import { createRequire as __cr } from "node:module"; const require = __cr(import.meta.url);',
    },
    logLevel: "warning",
  });
  writeFileSync(join(build, "cli/main.js"), '#!/usr/bin/env node\nimport "../joined/main.js";\n');
}

copyRuntimeText();
copySchema();
await packRuntimeText();
await joinFiles();
chmodSync(join(build, "cli/main.js"), 0o755);
