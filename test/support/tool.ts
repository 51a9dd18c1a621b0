import { spawnSync } from "node:child_process";

/** Programs outside npm, by the name that `npm test -- --without NAME` takes; `.ci/tools.mjs` holds the same list. */
export type ToolName = "chromium" | "clang" | "cppcheck" | "scipy";

const works = (command: string, args: readonly string[]): boolean =>
  spawnSync(command, args, { stdio: "ignore" }).status === 0;

/** A Python that has scipy: Debian's own interpreter or the first of the path. */
export const pythonWithScipy = (): string | undefined =>
  ["/usr/bin/python3", "python3"].find((python) => works(python, ["-c", "import scipy"]));

const PRESENT: Record<ToolName, () => boolean> = {
  chromium: () => works("/usr/bin/chromium", ["--version"]),
  clang: () => works("clang", ["--version"]),
  cppcheck: () => works("cppcheck", ["--version"]),
  scipy: () => pythonWithScipy() !== undefined,
};

/**
 * True when the tool is missing or excused: `test.skipIf(cannotUse("clang"))(...)`.
 * The runner names every test skipped this way, and fails unless `--without` excuses the tool.
 */
export function cannotUse(name: ToolName): boolean {
  const excused = (process.env.SPOOLWRIGHT_WITHOUT ?? "").split(",");
  return excused.includes(name) || !PRESENT[name]();
}
