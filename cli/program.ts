import { Command } from "commander";
import { CommandFailure } from "./command-failure.ts";
import type { ExitCode } from "./exit-codes.ts";

const VERSION = "0.1.0";

/** The commands still to come, with the sentence that the help shows. */
const PLANNED: readonly (readonly [string, string])[] = [
  ["check", "reads a spec and reports diagnostics"],
  ["explain", "cause, example and fix of a diagnostic"],
  ["generate", "writes the controller as TypeScript and C"],
  ["simulate", "one run of the loop, or the plant alone"],
  ["verify", "runs the requirements against random manoeuvres"],
  ["replay", "reruns a counterexample"],
  ["tune", "computes the feedforward map from the plant"],
  ["steady", "steady map of the plant"],
  ["report", "writes the HTML report of an evidence file"],
];

function addPlanned(program: Command, name: string, sentence: string): void {
  program
    .command(name)
    .description(`${sentence} (not available in this version)`)
    .argument("[words...]")
    .allowUnknownOption()
    .action(() => {
      throw new CommandFailure(`\`${name}\` is not available in this version`);
    });
}

/** All commands; `done` receives the exit code of the one that ran. Commands load their code only when they run. */
export function buildProgram(_done: (code: ExitCode) => void): Command {
  const program = new Command("spoolwright")
    .description("From one spec of a boost loop to bit-identical TypeScript and C, plant tests and a report.")
    .version(VERSION)
    .exitOverride();
  for (const [name, sentence] of PLANNED) addPlanned(program, name, sentence);
  return program;
}
