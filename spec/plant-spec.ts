import type { Span } from "./span.ts";

/** A plant file in SI units, keys as in the file (camelCase); lists keep the file's order. Symbols: hil-sim/README.md. */
export interface PlantSpec {
  readonly name: string;
  readonly description: string;
  readonly turbo: { readonly count: number; readonly speedLimit: number };
  readonly engine: {
    readonly displacement: number;
    readonly compressionRatio: number;
    readonly volumetricEfficiency: readonly [number, number, number];
    readonly stoichiometricRatio: number;
    readonly lambda: number;
    readonly indicatedEfficiency: number;
    readonly heatingValue: number;
    readonly friction: readonly [number, number, number];
  };
  readonly volumes: { readonly boost: number; readonly intake: number; readonly exhaust: number };
  readonly losses: { readonly airFilter: number; readonly intercooler: number; readonly exhaust: number };
  readonly compressor: {
    readonly tipRadius: number;
    readonly referenceTipSpeed: number;
    readonly peakHead: number;
    readonly shutoffHead: number;
    readonly machLoss: number;
    readonly peakFlow: readonly [number, number];
    readonly chokeFlow: readonly [number, number, number];
    readonly chokePressureRatio: readonly [number, number];
    readonly tangentFrom: number;
    readonly reverseFlow: number;
    readonly flowTimeConstant: number;
    readonly workSlip: number;
    readonly workSlope: number;
    /** Reference temperature K and pressure Pa of the map. */
    readonly mapReference: readonly [number, number];
  };
  readonly intercooler: {
    readonly effectiveness: number;
    readonly effectivenessSlope: number;
    readonly coolantRise: number;
    readonly timeConstant: number;
  };
  readonly inlet: { readonly mixingTimeConstant: number; readonly mixingFlow: number };
  readonly intake: { readonly heating: number };
  readonly exhaust: {
    readonly temperatureBase: number;
    readonly temperatureRise: number;
    readonly temperatureFlow: number;
    readonly motoredRise: number;
    readonly wallFlow: number;
    readonly gasTimeConstant: number;
    readonly wallHeatCapacity: number;
    readonly wallLoss: number;
    readonly outletTimeConstant: number;
  };
  readonly turbine: {
    readonly flow: number;
    readonly efficiency: number;
    readonly tipRadius: number;
    readonly bestSpeedRatio: number;
    readonly linearAbove: number;
  };
  readonly rotor: { readonly inertia: number; readonly friction: number };
  readonly wastegate: {
    readonly leakArea: number;
    readonly portArea: number;
    readonly curtainFactor: number;
    readonly stallPressure: number;
    readonly deadZone: number;
    readonly timeConstant: number;
    readonly rate: number;
  };
  readonly throttle: {
    readonly leakArea: number;
    readonly area: number;
    readonly timeConstant: number;
    readonly rate: number;
  };
  readonly bypass: { readonly area: number; readonly timeConstant: number };
  readonly vehicle: {
    /** Constant load N·m, load over speed squared N·m·s2. */
    readonly load: readonly [number, number];
    readonly inertia: number;
  };
  readonly sensors: {
    /** Range Pa abs, bits of the converter, noise Pa (one standard deviation), bias Pa, time constant s. */
    readonly boostPressure: PressureSensorSpec;
    readonly ambientPressure: PressureSensorSpec;
    readonly manifoldPressure: PressureSensorSpec;
    readonly turboSpeed: { readonly pulsesPerRevolution: number; readonly window: number };
    readonly chargeTemperature: TemperatureSensorSpec;
    readonly inletTemperature: TemperatureSensorSpec;
    /** Quantum in rad/s. */
    readonly engineSpeed: { readonly step: number };
  };
  /** Where the plant is believed: rad/s, bare ratio, m/s. */
  readonly validity: {
    readonly engineSpeed: readonly [number, number];
    readonly pressureRatio: readonly [number, number];
    readonly tipSpeed: readonly [number, number];
  };
  /** Span of every value, by its dotted path as written in the file: `turbine.flow`. */
  readonly places: ReadonlyMap<string, Span>;
  readonly at: Span;
}

export interface PressureSensorSpec {
  readonly timeConstant: number;
  readonly noise: number;
  readonly range: readonly [number, number];
  readonly bits: number;
  readonly bias: number;
}

export interface TemperatureSensorSpec {
  readonly timeConstant: number;
  readonly step: number;
}
