// The programs outside npm that some tests need, by the name that `--without NAME` and SPOOLWRIGHT_WITHOUT take.
// Run by itself it prints the names of those that are missing.
import { spawnSync } from "node:child_process";
import { fileURLToPath } from "node:url";

const works = (command, args) => spawnSync(command, args, { stdio: "ignore" }).status === 0;

const TOOLS = {
  // Where Debian's package puts it; the browser tests start this one.
  chromium: () => works("/usr/bin/chromium", ["--version"]),
  clang: () => works("clang", ["--version"]),
  cppcheck: () => works("cppcheck", ["--version"]),
  // Debian's scipy belongs to Debian's interpreter, which need not be the first python3 of the path.
  scipy: () => ["/usr/bin/python3", "python3"].some((python) => works(python, ["-c", "import scipy"])),
};

export const toolNames = Object.keys(TOOLS);

export const missingTools = () => toolNames.filter((name) => !TOOLS[name]());

if (process.argv[1] === fileURLToPath(import.meta.url)) for (const name of missingTools()) console.log(name);
