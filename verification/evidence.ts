import type { TraceSignal } from "../spec/index.ts";

/**
 * The content of evidence.json: plain data, the same bytes for the same spec, version and seed on every machine.
 * Wall time, host and date are left out on purpose; the command line prints them beside it.
 */
export interface Evidence {
  readonly format: 1;
  readonly tool: { readonly name: "spoolwright"; readonly version: string };
  readonly seed: number;
  /** Independent random runs per scenario, fixed before the first of them. */
  readonly runsPerScenario: number;
  /** All simulations of the random runs; corner and shrink runs are counted apart. */
  readonly simulations: number;
  readonly extraSimulations: { readonly corner: number; readonly shrink: number };
  readonly controller: ControllerFacts;
  readonly plant: PlantFacts;
  /** Hashes of meaning (normalised data, not text): moving a comment leaves them alone. SHA-256, hex. */
  readonly hashes: { readonly controller: string; readonly plantAndTests: string };
  readonly scenarios: readonly ScenarioFacts[];
  readonly requirements: readonly RequirementResult[];
  /** Worst-case traces, one per scenario and run: several requirements may point at the same one. */
  readonly traces: readonly WorstTrace[];
  readonly compressorMap?: CompressorMap;
  readonly codeFigures?: CodeFigures;
  /** Sentences: what was assumed, and what this evidence does not show. */
  readonly assumptions: readonly string[];
  readonly cautions: readonly string[];
}

export interface ControllerFacts {
  readonly name: string;
  readonly description: string;
  readonly specFile: string;
  readonly precision: "float32" | "float64";
  readonly stepS: number;
  readonly guardStepS: number;
  /** What was run: the generated TypeScript, or the runtime itself. */
  readonly form: "generated typescript" | "runtime";
  readonly limits: Limits;
}

export interface PlantFacts {
  readonly name: string;
  readonly description: string;
  /** As written in the spec; absent: the plant is inline. */
  readonly file?: string;
}

/** Lines for the charts; absent where the spec has none. */
export interface Limits {
  readonly turboSpeedLimitRpm?: number;
  /** Where the trip acts: limit times (1 - margin). */
  readonly tripSpeedRpm?: number;
  readonly guardReferenceSpeedRpm?: number;
  readonly boostCeilingKpa: number;
}

export interface ScenarioFacts {
  readonly name: string;
  readonly line: number;
  readonly runs: number;
  /** What was drawn, for the reader: each free value with its range as numbers in `unit`. */
  readonly free: readonly {
    readonly name: string;
    readonly low: number;
    readonly high: number;
    readonly unit: string;
  }[];
  /** `none`, `set default`, `±10 %`. */
  readonly plantScatter: string;
  /** Runs that left the plant's stated validity, and runs in which a state was clamped. */
  readonly leftValidity: number;
  readonly clamped: number;
}

export type Verdict = "holds" | "violated" | "not_exercised";

/** One requirement on one scenario. */
export interface RequirementResult {
  readonly id: string;
  readonly says: string;
  readonly scenario: string;
  readonly pattern: string;
  readonly verdict: Verdict;
  /** Random closed-loop runs. Proved and searched evidence would be entries of their own. */
  readonly kind: "tested";
  readonly runs: number;
  readonly exercised: number;
  readonly violations: number;
  /** Random runs only; absent when nothing was exercised. */
  readonly worst?: WorstRun;
  readonly margins?: MarginDistribution;
  /**
   * One-sided 95 % Clopper-Pearson upper bound of the probability of a violation, over the exercised random runs;
   * 1 when none was exercised. Rounded up to six significant digits.
   */
  readonly violationProbabilityUpper95: number;
  /** Corner runs (ends of every range), listed apart: they never enter the counts or the bound above. */
  readonly corners: {
    readonly runs: number;
    readonly exercised: number;
    readonly violations: number;
    readonly worst?: WorstRun;
  };
  /** File name of the counterexample, beside the evidence. */
  readonly counterexample?: string;
  /** Where the requirement and the scenario are written. */
  readonly at: { readonly file: string; readonly line: number };
  readonly scenarioLine: number;
}

export interface WorstRun {
  /** Index of the run; the draw can be made again from (seed, scenario, run). */
  readonly run: number;
  readonly margin: number;
  /** The drawn values of that run, in the units they were written in. */
  readonly values: readonly { readonly name: string; readonly value: number; readonly unit: string }[];
  /** Index into `Evidence.traces`; absent when no trace was kept. */
  readonly trace?: number;
}

/** Margins of the exercised random runs: 1 comfortable by the whole allowance, 0 the edge, negative violated. */
export interface MarginDistribution {
  readonly quantiles: {
    readonly least: number;
    readonly p05: number;
    readonly median: number;
    readonly p95: number;
    readonly most: number;
  };
  /** Equal bins from `low` to `high`; values outside fall into the end bins. */
  readonly histogram: { readonly low: number; readonly high: number; readonly counts: readonly number[] };
}

/** Sampled every `stepS` from time 0; every array has the same length. Base units of TRACE_SIGNALS. */
export interface WorstTrace {
  readonly scenario: string;
  readonly kind: "random" | "corner";
  readonly run: number;
  readonly stepS: number;
  readonly signals: Partial<Readonly<Record<TraceSignal, readonly number[]>>>;
  /** Index into MODES, same sampling. */
  readonly mode: readonly number[];
  /** The compressor's way through its map, same sampling. */
  readonly operating: {
    readonly correctedFlowKgS: readonly number[];
    readonly pressureRatio: readonly number[];
  };
}

/** Per turbo; corrected flow kg/s against pressure ratio. */
export interface CompressorMap {
  readonly speedLines: readonly {
    readonly correctedSpeedRpm: number;
    readonly points: readonly MapPoint[];
  }[];
  readonly surge: readonly MapPoint[];
  readonly choke: readonly MapPoint[];
}
/** [corrected flow kg/s, pressure ratio] */
export type MapPoint = readonly [number, number];

/** Figures of the generated code, each with its name and unit; filled by the command line from the generator. */
export type CodeFigures = readonly {
  readonly name: string;
  readonly value: number | string;
  readonly unit: string;
}[];
