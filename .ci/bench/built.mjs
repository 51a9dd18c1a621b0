// The built parts of the project that the benchmarks measure, and the two examples.
import { readFileSync } from "node:fs";
import { dirname, join } from "node:path";
import { root } from "../prepare.mjs";

const load = (path) => import(join(root, "build", path));

export const spec = await load("spec/index.js");
export const generator = await load("generator/index.js");
export const hilSim = await load("hil-sim/index.js");
export const verification = await load("verification/index.js");
const { runtimeText } = await load("cli/runtime-text.js");
const { generatedController } = await load("cli/controller.js");

export { generatedController, runtimeText };

export const SMALLEST = "examples/01-smallest/smallest.yaml";
export const COMPLETE = "examples/skarn24/skarn24.yaml";

/** A checked loop from its file. */
export function readLoop(file) {
  const read = (path) => ({ file: path, text: readFileSync(join(root, path), "utf8") });
  const { spec: loop } = spec.readLoopSpec(read(file), (path) => read(join(dirname(file), path)));
  if (loop === undefined) throw new Error(`${file} has errors`);
  return loop;
}

/** Seconds that a function takes. */
export function secondsOf(work) {
  const begun = process.hrtime.bigint();
  work();
  return Number(process.hrtime.bigint() - begun) / 1e9;
}

/** The least of many short measurements: what the work takes when nothing else has the processor. */
export const least = (values) => Math.min(...values);
