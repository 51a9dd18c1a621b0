import { CommanderError } from "commander";
import { CommandFailure } from "./command-failure.ts";
import { EXIT, type ExitCode } from "./exit-codes.ts";
import { buildProgram } from "./program.ts";

const ISSUE_HINT = "please report it with the command, the spec file and the lines below";

/** An error nobody expected: what to report, with the frames of this program only, no bare stack. */
function describeOurFault(error: unknown, commandLine: readonly string[]): string {
  const cause = error instanceof Error ? error : new Error(String(error));
  const frames = (cause.stack ?? "")
    .split("\n")
    .filter((line) => line.includes("/build/") || line.includes("\\build\\"))
    .slice(0, 3)
    .map((line) => `  ${line.trim().replace(/\(?file:\/\/.*\/build\//, "(")}`);
  return [
    `spoolwright: this is a fault of the program, not of your file; ${ISSUE_HINT}`,
    `  command: spoolwright ${commandLine.join(" ")}`,
    `  node ${process.version} on ${process.platform}`,
    `  ${cause.name}: ${cause.message}`,
    ...frames,
  ].join("\n");
}

/** Runs one command and returns the exit code; nothing is thrown. */
export async function runCommandLine(commandLine: readonly string[]): Promise<ExitCode> {
  process.once("SIGINT", () => process.exit(EXIT.interrupted));
  let exitCode: ExitCode = EXIT.fine;
  try {
    const program = buildProgram((code) => {
      exitCode = code;
    });
    await program.parseAsync([...commandLine], { from: "user" });
    return exitCode;
  } catch (error) {
    if (error instanceof CommanderError) return error.exitCode === 0 ? EXIT.fine : EXIT.wrongUse;
    if (error instanceof CommandFailure) {
      process.stderr.write(`spoolwright: ${error.message}\n`);
      return error.exitCode;
    }
    process.stderr.write(`${describeOurFault(error, commandLine)}\n`);
    return EXIT.ourFault;
  }
}
