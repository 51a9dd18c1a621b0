// Time of the controller's steps alone: generated TypeScript float32 against generated C, on inputs of a real run.
import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import {
  COMPLETE,
  generatedController,
  generator,
  hilSim,
  least,
  readLoop,
  runtimeText,
  secondsOf,
  verification,
} from "./built.mjs";
import { TIP_IN } from "./loop-speed.mjs";

const PASSES = 2;
const REPEATS = 100;

/** What the controller reads at each fast step of a closed-loop run, rounded to float32. */
async function recordedInputs(loop) {
  const port = await verification.loadController(generatedController(loop), loop);
  const inputs = [];
  const { stepGuard } = port;
  port.stepGuard = () => {
    inputs.push(
      Object.fromEntries(Object.entries(port.input).map(([key, value]) => [key, Math.fround(value)])),
    );
    stepGuard.call(port);
  };
  const parameters = hilSim.plantParameters(loop.plant);
  const plant = { parameters, sensors: loop.plant.sensors, validity: loop.plant.validity };
  const restOpening = loop.controller.actuator.restOpening.value;
  hilSim.runLoop(plant, TIP_IN, port, hilSim.newTrace(["turbo_speed"], TIP_IN.duration), { restOpening });
  return inputs;
}

const entryOf = (layout, name) => layout.entries.find((entry) => entry.function === name);
const inputFields = (layout) =>
  layout.structs
    .filter(({ role, outer }) => role === "input" && outer)
    .flatMap(({ name, fields }) => fields.map((field) => ({ struct: name, ...field })));

/** Nanoseconds of one slow step together with its fast steps, in this process. */
async function typescriptNanoseconds(program, inputs, fastPerSlow) {
  const layout = generator.layoutOf(program);
  const module = generator.generatedModule(
    layout,
    await generator.loadTypeScript(generator.printTypeScript(program)),
  );
  const objects = Object.fromEntries(
    layout.structs
      .filter(({ outer }) => outer)
      .map(({ name }) => [
        name,
        name === layout.calibrationStruct ? module.createCalibration() : module.create(name),
      ]),
  );
  const [init, fast, slow] = ["initialise", "stepGuard", "stepBoost"].map((name) =>
    module.bind(name, objects),
  );
  const fields = inputFields(layout).map(({ struct, name, printed }) => ({
    holder: objects[struct],
    name,
    printed,
  }));
  const give = new Function(
    "objects",
    "input",
    fields.map(({ printed, name }, i) => `objects[${i}].${printed} = input.${name};`).join("\n"),
  );
  const holders = fields.map(({ holder }) => holder);
  const pass = () => {
    for (let k = 0; k < inputs.length; k++) {
      give(holders, inputs[k]);
      fast();
      if (k % fastPerSlow === 0) slow();
    }
  };
  init();
  for (let i = 0; i < 20; i++) pass();
  const times = Array.from({ length: REPEATS }, () => secondsOf(() => repeat(pass)));
  return (least(times) * 1e9) / (PASSES * Math.floor(inputs.length / fastPerSlow));
}

function repeat(pass) {
  for (let i = 0; i < PASSES; i++) pass();
}

/** The same passes around the generated C. */
function benchProgram(layout, inputs, fastPerSlow) {
  const variable = (struct) => `the_${struct}`;
  const call = (name) => {
    const { printed, parameters } = entryOf(layout, name);
    const given = parameters.map(({ struct }) =>
      struct === layout.calibrationStruct ? `&${layout.stem}_calibration_default` : `&${variable(struct)}`,
    );
    return `${printed}(${given.join(", ")});`;
  };
  const fields = inputFields(layout);
  const owned = layout.structs.filter(({ outer, name }) => outer && name !== layout.calibrationStruct);
  return `#define _POSIX_C_SOURCE 199309L
#include "${layout.stem}.h"
#include <stdio.h>
#include <time.h>
static const float inputs[${inputs.length}][${fields.length}] = {
${inputs.map((input) => `{${fields.map(({ name }) => input[name].toExponential(9)).join(",")}}`).join(",\n")}
};
${owned.map(({ name, printed }) => `static ${printed} ${variable(name)};`).join("\n")}
static void pass(void)
{
    for (int k = 0; k < ${inputs.length}; k++) {
${fields.map(({ struct, printed }, i) => `        ${variable(struct)}.${printed} = inputs[k][${i}];`).join("\n")}
        ${call("stepGuard")}
        if (k % ${fastPerSlow} == 0) { ${call("stepBoost")} }
    }
}
int main(void)
{
    ${call("initialise")}
    for (int i = 0; i < ${PASSES}; i++) { pass(); }
    for (int r = 0; r < ${REPEATS}; r++) {
        struct timespec a, b;
        clock_gettime(CLOCK_MONOTONIC, &a);
        for (int i = 0; i < ${PASSES}; i++) { pass(); }
        clock_gettime(CLOCK_MONOTONIC, &b);
        printf("%.9f\\n", (double)(b.tv_sec - a.tv_sec) + 1e-9 * (double)(b.tv_nsec - a.tv_nsec));
    }
    return 0;
}
`;
}

function nativeNanoseconds(program, inputs, fastPerSlow) {
  const folder = mkdtempSync(join(tmpdir(), "spoolwright-bench-"));
  try {
    const layout = generator.layoutOf(program);
    for (const [name, text] of generator.printC(program)) writeFileSync(join(folder, name), text);
    writeFileSync(join(folder, "bench.c"), benchProgram(layout, inputs, fastPerSlow));
    const sources = ["bench.c", `${layout.stem}.c`, `${layout.stem}_cal.c`];
    const flags = ["-std=c99", "-ffp-contract=off", "-fno-math-errno", "-O2", "-o", "bench"];
    execFileSync("gcc", [...flags, ...sources, "-lm"], { cwd: folder });
    const times = execFileSync(join(folder, "bench"), { encoding: "utf8" }).trim().split("\n").map(Number);
    return (least(times) * 1e9) / (PASSES * Math.floor(inputs.length / fastPerSlow));
  } finally {
    rmSync(folder, { recursive: true });
  }
}

export async function stepTimes() {
  const loop = readLoop(COMPLETE);
  const { program } = generator.generateKit(loop, runtimeText());
  const inputs = await recordedInputs(loop);
  const fastPerSlow = Math.round(loop.controller.step.value / loop.controller.guardStep.value);
  return {
    fastPerSlow,
    typescript: await typescriptNanoseconds(program, inputs, fastPerSlow),
    native: nativeNanoseconds(program, inputs, fastPerSlow),
  };
}
