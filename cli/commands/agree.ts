import { generateKit, type Program } from "../../generator/index.ts";
import { CommandFailure } from "../command-failure.ts";
import { EXIT, type ExitCode } from "../exit-codes.ts";
import { requireOutputs } from "../files/require-outputs.ts";
import { writeFileWhole } from "../files/write-file.ts";
import { jsonText, mention, refuse } from "../findings.ts";
import { loadLoop } from "../load-loop.ts";
import {
  type AgreementSubject,
  agree as agreeOnce,
  prepareAgreement,
  type TargetResult,
} from "../native/agree.ts";
import { isInstalled, NATIVE_BUILDS } from "../native/builds.ts";
import { openProgress } from "../progress.ts";
import { runtimeText } from "../runtime-text.ts";
import type { Session } from "../session.ts";
import { mustCompile } from "./generate.ts";

export interface AgreeOptions {
  readonly steps: number;
  readonly seed: number;
  readonly out?: string;
}

/** Frames of one chunk; nearly every frame runs a fast and a slow step from where the last one ended. */
const CHUNK_FRAMES = 10_000;
/** The interpreter is the slowest target: it is the reference of the first chunk, the generated TypeScript of the rest. */
const INTERPRETED_CHUNKS = 1;
/** Every other chunk has a share of its calibration values made extreme. */
const EXTREME_SHARE = 0.05;

interface Tally {
  readonly steps: Map<string, number>;
  readonly different: (TargetResult & { readonly chunk: number })[];
}

function count(tally: Tally, chunk: number, results: readonly TargetResult[]): number {
  for (const result of results) {
    const ran = result.fastSteps + result.slowSteps;
    if (ran === 0) throw new Error(`${result.target} did not run`);
    tally.steps.set(result.target, (tally.steps.get(result.target) ?? 0) + ran);
    if (result.difference !== undefined) tally.different.push({ ...result, chunk });
  }
  return results[0].fastSteps + results[0].slowSteps;
}

/** Runs chunks until every target has done `steps`, or two targets part. */
async function runChunks(subject: AgreementSubject, options: AgreeOptions, session: Session): Promise<Tally> {
  const tally: Tally = { steps: new Map(), different: [] };
  const progress = await openProgress(session, "agree", "steps");
  let done = 0;
  for (let chunk = 0; done < options.steps && tally.different.length === 0; chunk++) {
    const run = {
      seed: options.seed + chunk,
      frames: Math.min(CHUNK_FRAMES, Math.ceil((options.steps - done) / 2)),
      extreme: chunk % 2 === 0 ? 0 : EXTREME_SHARE,
    };
    const reference = chunk < INTERPRETED_CHUNKS ? "interpreter" : "typescript";
    done += count(tally, chunk, await agreeOnce(subject, run, reference));
    progress.update(Math.min(done, options.steps), options.steps);
  }
  progress.end();
  return tally;
}

/** `gcc -O0, -O2, -O3` of what is here; what is not is said, never passed over. */
function chooseBuilds() {
  const missing = [...new Set(NATIVE_BUILDS.map(({ compiler }) => compiler))].filter(
    (each) => !isInstalled(each),
  );
  if (missing.includes("gcc")) {
    throw new CommandFailure("gcc is not installed; the generated C cannot be compared without it");
  }
  return {
    builds: NATIVE_BUILDS.filter(({ compiler }) => !missing.includes(compiler)),
    notRun: NATIVE_BUILDS.filter(({ compiler }) => missing.includes(compiler)).map(({ name, compiler }) => ({
      name,
      why: `${compiler} is not installed`,
    })),
  };
}

async function runAll(program: Program, options: AgreeOptions, session: Session) {
  const { builds, notRun } = chooseBuilds();
  const subject = await prepareAgreement(program, builds);
  try {
    return { notRun, ...(await runChunks(subject, options, session)) };
  } finally {
    await subject.remove();
  }
}

/** `agree SPEC`: interpreter, generated TypeScript and compiled C step by step with hostile inputs, to the bit. */
export async function agree(specPath: string, options: AgreeOptions, session: Session): Promise<ExitCode> {
  const loaded = loadLoop(specPath);
  if (loaded.value === undefined) return refuse(loaded, session, "nothing was compared");
  mention(loaded, session);
  const inputs = loaded.sources.map(({ file }) => file);
  requireOutputs({ "--out": options.out }, inputs);
  const program = mustCompile(generateKit(loaded.value, runtimeText()));
  const { steps, different, notRun } = await runAll(program, options, session);
  const targets = [...steps].map(([name, ran]) => ({
    name,
    steps: ran,
    differing: different.some(({ target }) => target === name) ? 1 : 0,
  }));
  const ok = different.length === 0;
  const document = jsonText({ ok, seed: options.seed, targets, notRun, differences: different });
  if (options.out !== undefined) writeFileWhole(options.out, `${document}\n`);
  if (session.json) session.result(document);
  else report(session, targets, notRun, different);
  return ok ? EXIT.fine : EXIT.findings;
}

function report(
  session: Session,
  targets: readonly { readonly name: string; readonly steps: number }[],
  notRun: readonly { readonly name: string; readonly why: string }[],
  different: Tally["different"],
): void {
  for (const { target, chunk, difference } of different) {
    session.complain(
      `${target} differs in chunk ${chunk}, ${difference?.frame}: ${difference?.signal} is ${difference?.got}, expected ${difference?.expected}`,
    );
  }
  if (different.length === 0) session.note("every output and state equal to the bit:");
  for (const { name, steps } of targets) session.note(`  ${name.padEnd(12)} ${steps} steps`);
  for (const { name, why } of notRun) session.note(`  ${name.padEnd(12)} not run: ${why}`);
}
