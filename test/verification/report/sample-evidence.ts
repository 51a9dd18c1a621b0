import type { Evidence, MapPoint, RequirementResult, WorstTrace } from "../../../verification/evidence.ts";

/** An invented tip-in, shaped like one: the page needs something to draw, no test reads physics out of it. */
export function sampleTrace(
  scenario: string,
  run: number,
  kind: WorstTrace["kind"] = "random",
  samples = 401,
  stepS = 0.01,
): WorstTrace {
  const times = Array.from({ length: samples }, (_, i) => i * stepS);
  const rise = (t: number, start: number, tau: number): number =>
    t < start ? 0 : 1 - Math.exp((start - t) / tau);
  const wanted = times.map((t) => (t < 0.5 ? 112 : 238));
  const boost = times.map(
    (t) => 112 + 128 * rise(t, 0.6, 0.35) + 9 * rise(t, 1.1, 0.2) * Math.exp(-3 * Math.abs(t - 1.6)),
  );
  const flow = boost.map((p) => 0.03 + 0.0011 * (p - 100));
  return {
    scenario,
    kind,
    run,
    stepS,
    signals: {
      boost_wanted: wanted,
      boost_target: times.map((t) => Math.min(238, 112 + Math.max(0, t - 0.5) * 400)),
      boost_pressure: boost,
      wastegate_command: times.map((t) => (t < 0.5 ? 1 : t < 1.2 ? 0 : 0.25)),
      wastegate_opening: times.map((t) => 1 - rise(t, 0.52, 0.05) + 0.25 * rise(t, 1.22, 0.05)),
      turbo_speed: boost.map((p) => 35_000 + 720 * (p - 100)),
      torque_limit: times.map((t) => (t > 2.2 && t < 2.6 ? 0.4 : 1)),
      accelerator: times.map((t) => (t < 0.5 ? 0.2 : 1)),
      engine_speed: times.map((t) => 3000 + 250 * t),
    },
    mode: times.map((t) => (t < 0.05 ? 0 : t < 0.5 ? 1 : t > 2.2 && t < 2.6 ? 3 : 2)),
    operating: { correctedFlowKgS: flow, pressureRatio: boost.map((p) => p / 99) },
  };
}

function speedLine(speed: number): { correctedSpeedRpm: number; points: MapPoint[] } {
  const u = speed / 154_000;
  const peak = (1 + 1.7 * u * u * 0.25) ** 3.5;
  const points = Array.from({ length: 25 }, (_, i): MapPoint => {
    const s = i / 24;
    return [0.005 + 0.09 * u * u + (0.13 + 0.33 * u) * Math.sqrt(1 - s * s), 0.4 + (peak - 0.4) * s];
  });
  return { correctedSpeedRpm: speed, points };
}

export function sampleResult(over: Partial<RequirementResult> = {}): RequirementResult {
  return {
    id: "overshoot_small",
    says: "boost does not exceed the wanted target by more than 4.5 % after a tip-in",
    scenario: "tip_in",
    pattern: "overshoot",
    verdict: "holds",
    kind: "tested",
    runs: 1000,
    exercised: 998,
    violations: 0,
    worst: {
      run: 412,
      margin: 0.1816,
      values: [
        { name: "engine_speed", value: 5931.25, unit: "rpm" },
        { name: "accelerator[1].value", value: 97.4, unit: "%" },
        { name: "plant.turbine.efficiency", value: 0.7341, unit: "1" },
      ],
      trace: 0,
    },
    margins: {
      quantiles: { least: 0.1816, p05: 0.31, median: 0.52, p95: 0.83, most: 0.99 },
      histogram: { low: 0, high: 1, counts: [0, 3, 40, 160, 290, 260, 130, 70, 35, 10] },
    },
    violationProbabilityUpper95: 0.00299724,
    corners: {
      runs: 64,
      exercised: 64,
      violations: 0,
      worst: { run: 7, margin: 0.0921, values: [], trace: 1 },
    },
    at: { file: "examples/skarn24/skarn24.yaml", line: 214 },
    scenarioLine: 180,
    ...over,
  };
}

export const violated: Partial<RequirementResult> = {
  id: "turbo_speed_below_limit",
  says: "turbo speed never exceeds the mechanical limit",
  scenario: "boost_sensor_stuck",
  pattern: "stays",
  verdict: "violated",
  violations: 3,
  violationProbabilityUpper95: 0.00773941,
  worst: { run: 88, margin: -0.0312, values: [{ name: "engine_speed", value: 5500, unit: "rpm" }], trace: 1 },
  margins: {
    quantiles: { least: -0.0312, p05: 0.12, median: 0.4, p95: 0.6, most: 0.7 },
    histogram: { low: -0.2, high: 0.8, counts: [0, 3, 12, 60, 150, 300, 320, 120, 33, 0] },
  },
  counterexample: "turbo_speed_below_limit-boost_sensor_stuck.counterexample.yaml",
};

export function sampleEvidence(over: Partial<Evidence> = {}): Evidence {
  return {
    format: 1,
    tool: { name: "spoolwright", version: "0.1.0" },
    seed: 20240611,
    runsPerScenario: 1000,
    simulations: 2000,
    extraSimulations: { corner: 128, shrink: 61 },
    controller: {
      name: "skarn24",
      description: "Boost loop of an invented 2.4 l engine of the Skarn Hill prototypes.",
      specFile: "examples/skarn24/skarn24.yaml",
      precision: "float32",
      stepS: 0.005,
      guardStepS: 0.001,
      form: "generated typescript",
      limits: {
        turboSpeedLimitRpm: 165_000,
        tripSpeedRpm: 160_050,
        guardReferenceSpeedRpm: 158_000,
        boostCeilingKpa: 245,
      },
    },
    plant: { name: "skarn24", description: "Invented 2.4 l four, one turbo.", file: "skarn24.plant.yaml" },
    hashes: { controller: "4be1d09c".repeat(8), plantAndTests: "a7710ffe".repeat(8) },
    scenarios: [
      {
        name: "tip_in",
        line: 180,
        runs: 1000,
        free: [
          { name: "engine_speed", low: 2500, high: 6000, unit: "rpm" },
          { name: "accelerator[1].value", low: 60, high: 100, unit: "%" },
        ],
        plantScatter: "set default",
        leftValidity: 12,
        clamped: 0,
      },
      {
        name: "boost_sensor_stuck",
        line: 196,
        runs: 1000,
        free: [],
        plantScatter: "none",
        leftValidity: 0,
        clamped: 0,
      },
    ],
    requirements: [
      sampleResult(),
      sampleResult({
        id: "settles",
        says: "boost settles into 2.5 % within 0.8 s of first reaching it",
        pattern: "settles",
      }),
      sampleResult(violated),
      sampleResult({
        id: "steady_error",
        says: "the mean error of the last 0.3 s stays below 0.4 %",
        verdict: "not_exercised",
        exercised: 0,
        violationProbabilityUpper95: 1,
      }),
    ].map((result) => {
      if (result.verdict !== "not_exercised") return result;
      const { worst: _worst, margins: _margins, ...rest } = result;
      return rest;
    }),
    traces: [sampleTrace("tip_in", 412), sampleTrace("boost_sensor_stuck", 88)],
    compressorMap: {
      speedLines: [40_000, 70_000, 100_000, 120_000, 140_000, 160_000].map(speedLine),
      surge: [40, 70, 100, 120, 140, 160].map((k) => speedLine(k * 1000).points[24]),
      choke: [40, 70, 100, 120, 140, 160].map((k) => speedLine(k * 1000).points[0]),
    },
    codeFigures: [
      { name: "lines of C", value: 812, unit: "lines" },
      { name: "state", value: 124, unit: "bytes" },
    ],
    assumptions: [
      "The plant is a mean-value model: no pulses, no cylinder events.",
      "Plant parameters are scattered by the set `default`.",
    ],
    cautions: ["The plant is a model, not your engine.", "A bound holds for the stated distribution only."],
    ...over,
  };
}
