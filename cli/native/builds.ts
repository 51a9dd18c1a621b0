import { spawnSync } from "node:child_process";
import { ARITHMETIC } from "../../generator/index.ts";

/** One way to compile the generated C. */
export interface NativeBuild {
  /** `gcc -O2`. */
  readonly name: string;
  readonly compiler: "gcc" | "clang";
  readonly flags: readonly string[];
}

const build = (compiler: NativeBuild["compiler"], level: string): NativeBuild => ({
  name: `${compiler} ${level}`,
  compiler,
  flags: [...ARITHMETIC, level],
});

/** Every build that must agree with the reference to the bit. */
export const NATIVE_BUILDS: readonly NativeBuild[] = [
  build("gcc", "-O0"),
  build("gcc", "-O2"),
  build("gcc", "-O3"),
  build("clang", "-O2"),
];

/** Whether a program can be started here. */
export const isInstalled = (program: string): boolean =>
  spawnSync(program, ["--version"], { stdio: "ignore" }).status === 0;
