/** One run's manoeuvre with every free value drawn; plain numbers, so that it can be stored, shrunk and replayed. */
export interface FixedPoint {
  /** Seconds. */
  readonly at: number;
  readonly value: number;
  /** Seconds the value takes to get there, linearly; 0: a step. */
  readonly over: number;
}
export type FixedCourse = readonly FixedPoint[];

export interface FixedFault {
  readonly kind: string;
  /** Seconds. */
  readonly from: number;
  /** Seconds; Infinity: until the end. */
  readonly lasting: number;
  readonly values: Readonly<Record<string, number>>;
}

export interface DrawnScenario {
  readonly name: string;
  /** Seconds. */
  readonly duration: number;
  readonly engineSpeed:
    | { readonly kind: "imposed"; readonly course: FixedCourse }
    | { readonly kind: "vehicle"; readonly fromRpm: number };
  /** Ratio 0..1. */
  readonly accelerator: FixedCourse;
  /** kPa abs. */
  readonly target?: FixedCourse;
  readonly ceilings: boolean;
  /** Boost kPa abs that the run starts at in equilibrium; a target course's first value goes before it, without either the gate rests. */
  readonly startBoostKpa?: number;
  /** K, m. */
  readonly ambient: { readonly temperature: number; readonly altitude: number };
  /** Multiplies every sensor's noise; 0 switches noise off. */
  readonly sensorNoise: number;
  readonly faults: readonly FixedFault[];
  /** Seeds the sensors' noise; unsigned 32 bit. */
  readonly noiseSeed: number;
}
