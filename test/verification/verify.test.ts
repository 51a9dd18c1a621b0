import { beforeAll, describe, expect, it } from "vitest";
import {
  batchRunner,
  drawOfCounterexample,
  evidenceText,
  readCounterexample,
  replay,
  setInSpec,
  type Verified,
  verifyLoop,
} from "../../verification/index.ts";
import { exampleLoop, exampleText, runtimePort } from "./example-loop.ts";

const OPTIONS = {
  toolVersion: "0.0.0",
  seed: 1,
  runs: 6,
  corners: 3,
  shrinkBudget: 60,
  form: "runtime",
} as const;

/** The example with two short scenarios, and the anti-windup as given. */
const loopWith = (method: "conditional" | "none") => {
  const antiWindup = method === "none" ? { method } : { method, band: "10 %", still_below: "15 %/s" };
  const text = setInSpec(exampleText(), "controller.feedback.anti_windup", antiWindup);
  const all = exampleLoop(text);
  const scenarios = all.scenarios.filter(({ name }) => ["steps_up", "tip_in"].includes(name));
  return { ...all, scenarios };
};
const verified = (loop: ReturnType<typeof loopWith>, options = {}) =>
  verifyLoop(loop, async (batch) => batchRunner(loop, runtimePort(loop), 1)(batch), runtimePort(loop), {
    ...OPTIONS,
    ...options,
  });

const good = loopWith("conditional");
const bad = loopWith("none");
let goodResult: Verified;
let badResult: Verified;
beforeAll(async () => {
  goodResult = await verified(good);
  badResult = await verified(bad);
});

describe("verifying a loop", () => {
  it("gives a result for each requirement on each of its scenarios, with counts that add up", () => {
    const { evidence } = goodResult;
    const pairs = good.requirements.flatMap(({ id, scenarios }) =>
      good.scenarios
        .filter(({ name }) => scenarios.length === 0 || scenarios.includes(name))
        .map(({ name }) => `${id} ${name}`),
    );
    expect(evidence.requirements.map(({ id, scenario }) => `${id} ${scenario}`)).toEqual(pairs);
    expect(evidence.simulations).toBe(12);
    expect(evidence.extraSimulations).toEqual({ corner: 6, shrink: 0 });
    for (const result of evidence.requirements) {
      expect(result).toMatchObject({ kind: "tested", runs: 6, violations: 0, verdict: "holds" });
      expect(result.exercised).toBeLessThanOrEqual(6);
      // Six runs without a violation: 1 - 0.05^(1/6) = 0.3930 by hand.
      if (result.exercised === 6) expect(result.violationProbabilityUpper95).toBeCloseTo(0.393, 3);
      expect(evidence.traces[result.worst?.trace ?? -1]).toMatchObject({
        scenario: result.scenario,
        run: result.worst?.run,
      });
    }
  });

  it("keeps the worst runs' traces, all signals of one length, every 10 ms", () => {
    for (const trace of goodResult.evidence.traces) {
      const lengths = [
        ...Object.values(trace.signals).map(({ length }) => length),
        trace.mode.length,
        trace.operating.correctedFlowKgS.length,
        trace.operating.pressureRatio.length,
      ];
      expect(new Set(lengths).size).toBe(1);
      expect(trace.stepS).toBe(0.01);
      expect(lengths[0]).toBe(Math.floor((trace.scenario === "tip_in" ? 6 : 4.5) / 0.01 + 0.5) + 1);
    }
  });

  it("is plain data with no NaN, and the same bytes again", async () => {
    const text = evidenceText(goodResult.evidence);
    expect(JSON.parse(text)).toEqual(goodResult.evidence);
    expect(evidenceText((await verified(good)).evidence)).toBe(text);
    expect(evidenceText((await verified(good, { seed: 2 })).evidence)).not.toBe(text);
  });

  it("says where requirement and scenario are written", () => {
    const lines = exampleText().split("\n");
    for (const { id, scenario, at, scenarioLine } of goodResult.evidence.requirements) {
      expect(lines[at.line - 1]).toContain(`id: ${id}`);
      expect(lines[scenarioLine - 1]).toContain(`${scenario}:`);
    }
  });

  it("draws a compressor map whose surge line lies left of its choke line", () => {
    const map = goodResult.evidence.compressorMap;
    expect(map?.speedLines.length).toBeGreaterThan(4);
    map?.surge.forEach(([flow, ratio], k) => {
      expect(flow).toBeLessThan(map.choke[k][0]);
      expect(ratio).toBeGreaterThan(map.choke[k][1]);
    });
  });
});

describe("a violated requirement", () => {
  it("comes with a counterexample that replays to the same margin, to the bit", () => {
    const violated = badResult.evidence.requirements.filter(({ verdict }) => verdict === "violated");
    expect(violated.map(({ id }) => id)).toContain("tip_in_overshoot");
    expect(badResult.counterexamples.map(({ name }) => name)).toEqual(
      violated.map(({ counterexample }) => counterexample),
    );
    for (const { name, text } of badResult.counterexamples) {
      const { counterexample } = readCounterexample({ file: name, text });
      const located = counterexample && drawOfCounterexample(counterexample, bad).located;
      if (!counterexample || !located) throw new Error(`${name} does not read back`);
      expect(counterexample.margin).toBeLessThan(0);
      expect(replay(bad, located, runtimePort(bad)).margin).toBe(counterexample.margin);
    }
  });

  it("is shrunk: nominal plant, no noise, a round engine speed", () => {
    const file = badResult.counterexamples.find(({ name }) => name.startsWith("tip_in_overshoot"));
    const { counterexample } = readCounterexample({ file: "x", text: file?.text ?? "" });
    expect(counterexample).toMatchObject({ noise: false, plantScatter: [] });
    expect(counterexample?.values).toMatchObject([{ name: "engine_speed", written: "5000 rpm" }]);
  });

  it("is fixed when its replay on the good controller holds", () => {
    const { text } = badResult.counterexamples[0];
    const { counterexample } = readCounterexample({ file: "x", text });
    const located = counterexample && drawOfCounterexample(counterexample, good).located;
    if (!located) throw new Error("does not read back");
    expect(replay(good, located, runtimePort(good)).margin).toBeGreaterThan(0);
  });
});
