import { Command, InvalidArgumentError } from "commander";
import { CommandFailure } from "./command-failure.ts";
import type { ExitCode } from "./exit-codes.ts";
import { type CommonOptions, openSession } from "./session.ts";

const VERSION = "0.1.0";

/** The commands still to come, with the sentence that the help shows. */
const PLANNED: readonly (readonly [string, string])[] = [
  ["verify", "runs the requirements against random manoeuvres"],
  ["replay", "reruns a counterexample"],
  ["tune", "computes the feedforward map from the plant"],
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

/** Parses an option's whole number; `1e6` is one. */
const wholeNumber =
  (low: number, high: number) =>
  (text: string): number => {
    const value = /^\d+(\.\d+)?(e\d+)?$/.test(text) ? Number(text) : Number.NaN;
    if (Number.isInteger(value) && value >= low && value <= high) return value;
    throw new InvalidArgumentError(`expected a whole number from ${low} to ${high}.`);
  };

/** A command with the options that all commands share. */
const add = (program: Command, usage: string, sentence: string): Command =>
  program
    .command(usage)
    .description(sentence)
    .option("--json", "one JSON document on standard output and nothing else there")
    .option("--quiet", "no text beside results and findings")
    .option("--no-color", "no colour (also: NO_COLOR in the environment)");

/** All commands; `done` receives the exit code of the one that ran. Commands load their code only when they run. */
export function buildProgram(done: (code: ExitCode) => void): Command {
  const program = new Command("spoolwright")
    .description("From one spec of a boost loop to bit-identical TypeScript and C, plant tests and a report.")
    .version(VERSION)
    .exitOverride();

  add(program, "check <spec>", "reads a spec and reports everything that is wrong with it").action(
    async (spec: string, options: CommonOptions) => {
      const { check } = await import("./commands/check.ts");
      done(check(spec, openSession(options)));
    },
  );
  add(program, "explain <code>", "cause, example and fix of a diagnostic").action(
    async (code: string, options: CommonOptions) => {
      const { explain } = await import("./commands/explain.ts");
      done(explain(code, openSession(options)));
    },
  );
  add(program, "steady <plant>", "steady map of the plant over engine speed and gate opening")
    .option("--csv <file>", "write the map as CSV")
    .action(async (plant: string, options: CommonOptions & { csv?: string }) => {
      const { steady } = await import("./commands/steady.ts");
      done(steady(plant, options, openSession(options)));
    });

  add(program, "generate <spec>", "writes the controller as TypeScript and C with calibration and manifest")
    .requiredOption("--out <folder>", "folder to write; replaced as a whole")
    .action(async (spec: string, options: CommonOptions & { out: string }) => {
      const { generate } = await import("./commands/generate.ts");
      done(generate(spec, options, openSession(options)));
    });
  add(
    program,
    "agree <spec>",
    "steps the controller's interpreter, TypeScript and compiled C side by side, to the bit",
  )
    .option("--steps <n>", "steps of every target", wholeNumber(1, 1e12), 20_000)
    .option("--seed <n>", "seed of the inputs", wholeNumber(0, 2 ** 32 - 1), 1)
    .option("--out <file>", "write the result as JSON, for the report")
    .action(async (spec: string, options: CommonOptions & { steps: number; seed: number; out?: string }) => {
      const { agree } = await import("./commands/agree.ts");
      done(await agree(spec, options, openSession(options)));
    });
  add(program, "simulate <file>", "one run: of a loop spec's scenario, or of a plant file alone")
    .option("--inputs <file>", "plant alone: CSV of commands and surroundings")
    .option("--csv <file>", "write the rows there")
    .action(async (file: string, options: CommonOptions & { inputs?: string; csv?: string }) => {
      const { inputs, ...rest } = options;
      if (inputs === undefined) throw new CommandFailure("`simulate` needs --inputs FILE.csv for a plant");
      const { simulatePlant } = await import("./commands/simulate-plant.ts");
      done(simulatePlant(file, { inputs, ...rest }, openSession(options)));
    });

  for (const [name, sentence] of PLANNED) addPlanned(program, name, sentence);
  return program;
}
