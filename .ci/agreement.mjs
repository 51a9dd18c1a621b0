// npm run agreement -- --steps 1e8: the complete example's controller, every target against every other, to the bit.
import { join } from "node:path";
import { prepare, root, run } from "./prepare.mjs";

prepare();
const cli = join(root, "build/cli/main.js");
process.exit(
  run(process.execPath, [cli, "agree", "examples/skarn24/skarn24.yaml", ...process.argv.slice(2)]),
);
