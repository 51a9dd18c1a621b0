import { existsSync, mkdirSync, readFileSync, writeFileSync } from "node:fs";
import { beforeAll, describe, expect, test } from "vitest";
import { type Trace, traceHash } from "../../hil-sim/index.ts";
import type { TraceSignal } from "../../spec/index.ts";
import {
  drawRun,
  loadController,
  type RunDraw,
  scatterNames,
  scenarioRunner,
} from "../../verification/index.ts";
import { exampleLoop, generatedController } from "./example-loop.ts";

// One committed hash per scenario of the complete example: run 0 of seed 1, generated float32 controller, noise and
// scatter as drawn. Another machine, Node version or edit that moves one bit fails here. Samples every 250 ms are
// committed beside the hash, so that a mismatch names time, signal and both bit patterns.
// Accept with: npm test -- --update skarn24-traces
const FILE = "test/reference/traces/skarn24.json";
const UPDATE = (process.env.SPOOLWRIGHT_UPDATE ?? "").split(",").includes("skarn24-traces");
const EVERY = 250;
const SIGNALS: TraceSignal[] = [
  "boost_pressure",
  "boost_target",
  "turbo_speed",
  "wastegate_command",
  "torque_limit",
];

interface Committed {
  readonly hash: string;
  /** Bits of one sample each 250 ms, by signal, as 16 hexadecimal digits. */
  readonly samples: Readonly<Record<string, readonly string[]>>;
}

function bitsOf(value: number): string {
  const view = new DataView(new ArrayBuffer(8));
  view.setFloat64(0, value);
  return view.getBigUint64(0).toString(16).padStart(16, "0");
}

function summaryOf(trace: Trace): Committed {
  const times = Array.from({ length: Math.ceil(trace.length / EVERY) }, (_, k) => k * EVERY);
  const samplesOf = (signal: TraceSignal) =>
    times.map((at) => bitsOf(trace.signals[signal]?.[at] ?? Number.NaN));
  return {
    hash: traceHash(trace),
    samples: Object.fromEntries(SIGNALS.map((name) => [name, samplesOf(name)])),
  };
}

/** The first committed sample that differs, in words; undefined when none does. */
function firstDifference(now: Committed, before: Committed): string | undefined {
  const count = Math.max(...SIGNALS.map((signal) => now.samples[signal].length));
  for (let k = 0; k < count; k++) {
    for (const signal of SIGNALS) {
      const [is, was] = [now.samples[signal][k], before.samples[signal]?.[k]];
      if (is !== was) return `at ${(k * EVERY) / 1000} s ${signal} is ${is}, was ${was}`;
    }
  }
  return now.hash === before.hash
    ? undefined
    : `hash ${now.hash}, was ${before.hash}, between the samples kept`;
}

const loop = exampleLoop();
const committed: Record<string, Committed> = existsSync(FILE) ? JSON.parse(readFileSync(FILE, "utf8")) : {};
const runs = new Map<string, RunDraw>();

beforeAll(async () => {
  const port = await loadController(generatedController(loop), loop);
  for (const scenario of loop.scenarios)
    runs.set(scenario.name, scenarioRunner(loop, scenario, port, SIGNALS));
});

describe("the complete example runs the same to the bit as when it was committed", () => {
  test.each(loop.scenarios)("$name", (scenario) => {
    const draw = drawRun(scenario, scatterNames(scenario.plantScatter).length, 1, 0);
    const now = summaryOf((runs.get(scenario.name) as RunDraw)(draw).trace);
    if (UPDATE) {
      committed[scenario.name] = now;
      mkdirSync("test/reference/traces", { recursive: true });
      writeFileSync(FILE, `${JSON.stringify(committed, null, 1)}\n`);
    }
    expect(committed[scenario.name], "accept with: npm test -- --update skarn24-traces").toBeDefined();
    expect(firstDifference(now, committed[scenario.name])).toBeUndefined();
  });
});
