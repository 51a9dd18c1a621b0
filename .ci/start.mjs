// npm start: from a clean clone to the report of the complete example, with nothing but Node and gcc.
import { spawnSync } from "node:child_process";
import { join } from "node:path";
import { prepare, root, run } from "./prepare.mjs";

const SPEC = "examples/skarn24/skarn24.yaml";
const OUT = "out/skarn24";
const REPORT = `${OUT}-report.html`;

/** Runs one command of spoolwright and shows it; ends with its exit code when it is not 0. */
function step(...args) {
  console.log(`\n$ spoolwright ${args.join(" ")}`);
  const code = run(process.execPath, [join(root, "build/cli/main.js"), ...args]);
  if (code !== 0) process.exit(code);
}

prepare();

const begun = performance.now();
// fewer runs than the 1000 that verify makes by itself: the whole tour stays within a minute or so
const files = ["--runs", "500", "--evidence", `${OUT}-evidence.json`, "--report", REPORT];
step("check", SPEC);
step("generate", SPEC, "--out", OUT);
if (spawnSync("gcc", ["--version"], { stdio: "ignore" }).status === 0) {
  step("agree", SPEC, "--out", `${OUT}-agreement.json`);
  step("verify", SPEC, "--agreement", `${OUT}-agreement.json`, ...files);
} else {
  console.log("\ngcc is not installed: the generated C was not compiled and not compared");
  step("verify", SPEC, ...files);
}
console.log(`\nThe report: ${REPORT}   (${((performance.now() - begun) / 1000).toFixed(0)} s)`);
