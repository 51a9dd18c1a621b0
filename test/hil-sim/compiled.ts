import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, symlinkSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { fileURLToPath } from "node:url";

const ROOT = fileURLToPath(new URL("../..", import.meta.url));

/** Compiles one program of test/hil-sim as the package is built, runs it by node alone, and gives back what it printed as JSON. */
export function runCompiled(program: string): unknown {
  const folder = mkdtempSync(join(tmpdir(), "hil-sim-"));
  try {
    const options = { noEmit: false, rootDir: ROOT, outDir: folder };
    const config = {
      extends: join(ROOT, "tsconfig.json"),
      compilerOptions: options,
      files: [join(ROOT, "test/hil-sim", program)],
      include: [],
    };
    writeFileSync(join(folder, "tsconfig.json"), JSON.stringify(config));
    writeFileSync(join(folder, "package.json"), '{ "type": "module" }');
    for (const name of ["node_modules", "examples"]) symlinkSync(join(ROOT, name), join(folder, name));
    execFileSync(join(ROOT, "node_modules/.bin/tsc"), ["-p", join(folder, "tsconfig.json")], { cwd: folder });
    const built = join(folder, "test/hil-sim", program.replace(/\.ts$/, ".js"));
    return JSON.parse(execFileSync(process.execPath, ["--expose-gc", built], { encoding: "utf8" }));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}
