// Wall time of a command from a cold process, beside that of an empty node process.
import { spawnSync } from "node:child_process";
import { join } from "node:path";
import { root } from "../prepare.mjs";
import { COMPLETE, least, secondsOf } from "./built.mjs";

const REPEATS = 9;

function leastSeconds(args) {
  const times = Array.from({ length: REPEATS }, () =>
    secondsOf(() => {
      const { status } = spawnSync(process.execPath, args, { cwd: root, stdio: "ignore" });
      if (status !== 0) throw new Error(`node ${args.join(" ")} ended with ${status}`);
    }),
  );
  return least(times);
}

export function coldStarts() {
  const cli = join(root, "build/cli/main.js");
  return {
    node: leastSeconds(["-e", "0"]),
    check: leastSeconds([cli, "check", COMPLETE]),
    generate: leastSeconds([cli, "generate", COMPLETE, "--out", "out/bench"]),
  };
}
