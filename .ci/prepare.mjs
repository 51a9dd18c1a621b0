// Makes a clone ready to run with nothing but Node: installed packages that match the lock file, and a fresh build.
import { spawnSync } from "node:child_process";
import { existsSync, readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { fileURLToPath } from "node:url";

export const root = dirname(dirname(fileURLToPath(import.meta.url)));
const npm = process.platform === "win32" ? "npm.cmd" : "npm";

/** Runs a program in the repository's root with its output passed through; returns the exit code. */
export function run(command, args, environment = {}) {
  const result = spawnSync(command, args, {
    cwd: root,
    stdio: "inherit",
    env: { ...process.env, ...environment },
  });
  return result.status ?? 1;
}

function mustRun(command, args) {
  const code = run(command, args);
  if (code !== 0) {
    console.error(`${command} ${args.join(" ")} failed with exit code ${code}`);
    process.exit(code);
  }
}

function packagesOf(file) {
  return existsSync(file) ? JSON.parse(readFileSync(file, "utf8")).packages : {};
}

/** True when a package of the lock file is missing or has another version; packages of other platforms do not count. */
function packagesAreStale() {
  const installed = packagesOf(join(root, "node_modules/.package-lock.json"));
  return Object.entries(packagesOf(join(root, "package-lock.json"))).some(
    ([path, wanted]) =>
      path !== "" &&
      wanted.optional !== true &&
      (installed[path]?.version !== wanted.version || !existsSync(join(root, path))),
  );
}

export function prepare() {
  if (packagesAreStale()) {
    console.log("installing the packages of package-lock.json ...");
    mustRun(npm, ["ci", "--no-audit", "--no-fund"]);
  }
  mustRun(npm, ["run", "--silent", "build"]);
}
