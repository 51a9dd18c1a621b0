// npm run bench: the machine, and figures measured in one run. Compare the ratios; the times are this machine's.
import { execFileSync } from "node:child_process";
import { cpus, loadavg } from "node:os";
import { prepare } from "./prepare.mjs";

prepare();
const { coldStarts } = await import("./bench/cold-start.mjs");
const { loopSpeeds, verificationSeconds } = await import("./bench/loop-speed.mjs");
const { stepTimes } = await import("./bench/step-speed.mjs");

const gcc = execFileSync("gcc", ["-dumpfullversion"], { encoding: "utf8" }).trim();
console.log(`machine: ${cpus().length} x ${cpus()[0].model}, node ${process.version}, gcc ${gcc}`);
console.log(`load before: ${loadavg()[0].toFixed(1)} (more than 1 or so spoils the times)`);

const step = await stepTimes();
console.log(`\none slow step with its ${step.fastPerSlow} fast steps, complete example, float32`);
console.log(`  generated C, gcc -O2      ${step.native.toFixed(0)} ns`);
console.log(`  generated TypeScript      ${step.typescript.toFixed(0)} ns`);
console.log(`  ratio                     ${(step.typescript / step.native).toFixed(2)}`);

const loop = await loopSpeeds();
console.log("\nclosed loop, simulated seconds per wall second, one thread");
console.log(`  smallest                  ${loop.smallest.toFixed(0)}`);
console.log(`  complete                  ${loop.complete.toFixed(0)}`);

const verified = await verificationSeconds();
console.log(`\n1000 verification runs of 5 s (${verified.scenario}), one thread`);
console.log(`  ${verified.seconds.toFixed(1)} s`);

const cold = coldStarts();
console.log("\ncold process, least of 9");
console.log(`  node alone                ${cold.node.toFixed(3)} s`);
console.log(
  `  check                     ${cold.check.toFixed(3)} s   (+${(cold.check - cold.node).toFixed(3)} s)`,
);
console.log(
  `  generate                  ${cold.generate.toFixed(3)} s   (+${(cold.generate - cold.node).toFixed(3)} s)`,
);
