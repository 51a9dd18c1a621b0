// npm start: from a clean clone to the report of the complete example, with nothing but Node and gcc.
import { join } from "node:path";
import { prepare, root, run } from "./prepare.mjs";

const SPEC = "examples/skarn24/skarn24.yaml";
const cli = join(root, "build/cli/main.js");

prepare();

const steps = [
  ["check", SPEC],
  ["generate", SPEC, "--out", "out/skarn24"],
  ["verify", SPEC, "--evidence", "out/skarn24-evidence.json", "--report", "out/skarn24-report.html"],
];

for (const step of steps) {
  console.log(`\n$ spoolwright ${step.join(" ")}`);
  const code = run(process.execPath, [cli, ...step]);
  if (code !== 0) process.exit(code);
}
