import {
  type ControllerModule,
  type Difference,
  type Frames,
  firstDifference,
  frameLayout,
  generatedModule,
  hostileCalibration,
  hostileFrames,
  interpretedModule,
  layoutOf,
  loadTypeScript,
  type Program,
  printC,
  printHarness,
  printTypeScript,
  type Recording,
  recordedSteps,
  runModule,
  specifiedCalibration,
  type WordBuffer,
} from "../../generator/index.ts";
import { buildNative, type NativeFolder, writeSources } from "./build-native.ts";
import type { NativeBuild } from "./builds.ts";
import { runNative } from "./run-native.ts";

/** What to run every target through. */
export interface AgreementRun {
  readonly seed: number;
  /** Frames; nearly all run both steps, some only one. */
  readonly frames: number;
  /** Share of calibration values made extreme. */
  readonly extreme: number;
}

/** How one target did. */
export interface TargetResult {
  readonly target: string;
  readonly fastSteps: number;
  readonly slowSteps: number;
  readonly difference?: Difference;
}

const inputBytes = (frames: Frames, calibration: WordBuffer): Uint8Array => {
  const count = Buffer.alloc(4);
  count.writeUInt32LE(frames.count);
  return Buffer.concat([count, calibration.bytes, frames.words.bytes]);
};

/** A controller ready to be run by every target: the modules of this process and the compiled programs. */
export interface AgreementSubject {
  readonly program: Program;
  readonly interpreter: ControllerModule;
  readonly typescript: ControllerModule;
  readonly builds: readonly NativeBuild[];
  readonly folder: NativeFolder;
  readonly remove: () => Promise<void>;
}

type Files = ReadonlyMap<string, string>;

/** Prints, loads and compiles a controller for every target. `change` lets a test break the C on purpose. */
export const prepareAgreement = async (
  program: Program,
  builds: readonly NativeBuild[],
  change: (files: Files) => Files = (files) => files,
): Promise<AgreementSubject> => {
  const files = new Map([...printC(program), [`${program.name}_record.c`, printHarness(program)]]);
  const folder = await writeSources(change(files));
  await buildNative(
    folder,
    [`${program.name}.c`, `${program.name}_cal.c`, `${program.name}_record.c`],
    builds,
  );
  return {
    program,
    interpreter: interpretedModule(program),
    typescript: generatedModule(layoutOf(program), await loadTypeScript(printTypeScript(program))),
    builds,
    folder,
    remove: folder.remove,
  };
};

/**
 * Runs every target through the same frames and compares all that each records with the reference, bit by bit. The
 * reference is the interpreter, or the generated TypeScript for long runs.
 */
export const agree = async (
  subject: AgreementSubject,
  run: AgreementRun,
  reference: "interpreter" | "typescript",
): Promise<readonly TargetResult[]> => {
  const layout = layoutOf(subject.program);
  const shape = frameLayout(layout);
  const frames = hostileFrames(shape, run.seed, run.frames);
  const given = specifiedCalibration(subject.interpreter);
  const calibration = run.extreme > 0 ? hostileCalibration(shape, given, run.seed, run.extreme) : given;
  const twin = runModule(subject.typescript, calibration, frames);
  const first: Recording =
    reference === "typescript" ? twin : runModule(subject.interpreter, calibration, frames);
  const result = (target: string, bytes: Uint8Array): TargetResult => {
    const difference = firstDifference(layout, run.frames, first, bytes);
    return { target, ...recordedSteps(shape, bytes), ...(difference === undefined ? {} : { difference }) };
  };
  const inProcess = [
    result(reference, first.words.bytes),
    ...(reference === "interpreter" ? [result("typescript", twin.words.bytes)] : []),
  ];
  const input = inputBytes(frames, calibration);
  const recorded = await runNative(subject.folder, subject.builds, input);
  const native = [...recorded].map(([name, bytes]) => result(name, bytes));
  return [...inProcess, ...native];
};
