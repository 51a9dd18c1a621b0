import { Command } from "commander";
import { CommandFailure } from "./command-failure.ts";
import type { ExitCode } from "./exit-codes.ts";
import { collect, names, wholeNumber } from "./option-values.ts";
import { type CommonOptions, openSession } from "./session.ts";
import { VERSION } from "./version.ts";

type Done = (code: ExitCode) => void;

const LARGEST_SEED = 2 ** 32 - 1;

/** A command with the options that all commands share. */
const add = (program: Command, usage: string, sentence: string): Command =>
  program
    .command(usage)
    .description(sentence)
    .option("--json", "one JSON document on standard output and nothing else there")
    .option("--quiet", "no text beside results and findings")
    .option("--no-color", "no colour (also: NO_COLOR in the environment)");

function addReading(program: Command, done: Done): void {
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
}

function addCode(program: Command, done: Done): void {
  add(program, "generate <spec>", "writes the controller as TypeScript and C with calibration and manifest")
    .requiredOption("--out <folder>", "folder to write; replaced as a whole")
    .action(async (spec: string, options: CommonOptions & { out: string }) => {
      const { generate } = await import("./commands/generate.ts");
      done(generate(spec, options, openSession(options)));
    });
  add(
    program,
    "agree <spec>",
    "steps interpreter, generated TypeScript and compiled C side by side, to the bit",
  )
    .option("--steps <n>", "steps of every target", wholeNumber(1, 1e12), 20_000)
    .option("--seed <n>", "seed of the inputs", wholeNumber(0, LARGEST_SEED), 1)
    .option("--out <file>", "write the result as JSON, for the report")
    .action(async (spec: string, options: CommonOptions & { steps: number; seed: number; out?: string }) => {
      const { agree } = await import("./commands/agree.ts");
      done(await agree(spec, options, openSession(options)));
    });
}

interface SimulateOptions extends CommonOptions {
  readonly inputs?: string;
  readonly scenario?: string;
  readonly set: readonly string[];
  readonly seed: number;
  readonly run?: number;
  readonly csv?: string;
  readonly plot?: string;
}

async function simulate(file: string, options: SimulateOptions): Promise<ExitCode> {
  const { inputs, scenario } = options;
  if ((inputs === undefined) === (scenario === undefined)) {
    throw new CommandFailure(
      "`simulate` needs either --scenario NAME for a spec or --inputs FILE.csv for a plant",
    );
  }
  if (inputs !== undefined) {
    const { simulatePlant } = await import("./commands/simulate-plant.ts");
    return simulatePlant(file, { ...options, inputs }, openSession(options));
  }
  const { simulateScenario } = await import("./commands/simulate-scenario.ts");
  return simulateScenario(file, { ...options, scenario: scenario ?? "" }, openSession(options));
}

function addPlant(program: Command, done: Done): void {
  add(program, "simulate <file>", "one run: of a spec's scenario in closed loop, or of a plant file alone")
    .option("--scenario <name>", "closed loop: the scenario to run")
    .option(
      "--set <path=value>",
      "closed loop: change a value of the spec for this run; repeatable",
      collect,
      [],
    )
    .option(
      "--run <n>",
      "closed loop: a random run; without it the middle of every range",
      wholeNumber(0, 1e9),
    )
    .option("--seed <n>", "closed loop: seed of the random runs", wholeNumber(0, LARGEST_SEED), 1)
    .option("--plot <file>", "closed loop: draw the run as .svg or .html")
    .option("--inputs <file>", "plant alone: CSV of commands and surroundings")
    .option("--csv <file>", "write the rows there")
    .action(async (file: string, options: SimulateOptions) => done(await simulate(file, options)));
  add(program, "steady <plant>", "steady map of the plant over engine speed and gate opening")
    .option("--csv <file>", "write the map as CSV")
    .option("--plot <file>", "draw it on the compressor map as .svg or .html")
    .action(async (plant: string, options: CommonOptions & { csv?: string; plot?: string }) => {
      const { steady } = await import("./commands/steady.ts");
      done(await steady(plant, options, openSession(options)));
    });
  add(program, "tune <spec>", "gate curve and feedforward table from the plant's steady states")
    .option("--write", "write them into the spec, comments kept")
    .action(async (spec: string, options: CommonOptions & { write?: boolean }) => {
      const { tune } = await import("./commands/tune.ts");
      done(tune(spec, options, openSession(options)));
    });
}

interface VerifyOptions extends CommonOptions {
  readonly runs: number;
  readonly seed: number;
  readonly only: readonly string[];
  readonly jobs?: number;
  readonly evidence?: string;
  readonly report?: string;
  readonly agreement?: string;
}

function addVerification(program: Command, done: Done): void {
  add(program, "verify <spec>", "tests the requirements in random closed-loop runs")
    .option("--runs <n>", "random runs per scenario", wholeNumber(1, 1e8), 1000)
    .option("--seed <n>", "seed of the random runs", wholeNumber(0, LARGEST_SEED), 1)
    .option("--only <names>", "requirements or scenarios, separated by commas", names, [])
    .option("--jobs <n>", "threads; the result does not depend on it", wholeNumber(1, 256))
    .option("--evidence <file>", "write the evidence as JSON")
    .option("--report <file>", "write the report as HTML")
    .option("--agreement <file>", "result of `agree --out`, for the report")
    .action(async (spec: string, options: VerifyOptions) => {
      const { verify } = await import("./commands/verify.ts");
      done(await verify(spec, options, openSession(options)));
    });
  add(program, "replay <counterexample>", "runs a counterexample again and says which requirement breaks")
    .option("--spec <file>", "its spec, if it does not lie beside it")
    .option("--plot <file>", "draw the run as .svg or .html")
    .option("--csv <file>", "write the rows there")
    .action(async (file: string, options: CommonOptions & { spec?: string; plot?: string; csv?: string }) => {
      const { replay } = await import("./commands/replay.ts");
      done(await replay(file, options, openSession(options)));
    });
  add(program, "report <evidence>", "writes the HTML report of an evidence file")
    .requiredOption("--out <file>", "the report")
    .option("--spec <file>", "its spec, for the calibration table and the code")
    .option("--agreement <file>", "result of `agree --out`")
    .action(
      async (file: string, options: CommonOptions & { out: string; spec?: string; agreement?: string }) => {
        const { report } = await import("./commands/report.ts");
        done(report(file, options, openSession(options)));
      },
    );
}

/** All commands; `done` receives the exit code of the one that ran. Commands load their code only when they run. */
export function buildProgram(done: Done): Command {
  const program = new Command("spoolwright")
    .description("From one spec of a boost loop to bit-identical TypeScript and C, plant tests and a report.")
    .version(VERSION)
    .exitOverride();
  addReading(program, done);
  addCode(program, done);
  addPlant(program, done);
  addVerification(program, done);
  return program;
}
