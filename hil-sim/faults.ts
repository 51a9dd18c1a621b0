import type { FixedFault } from "./drawn-scenario.ts";
import { wholeMilliseconds } from "./milliseconds.ts";
import type { PlantFaults } from "./plant/plant-input.ts";

/** Faults of sensors and tasks in force; plant faults are separate. Stuck values kPa and rpm, NaN: at the present value. */
export interface LoopFaults {
  boostLost: boolean;
  turboSpeedLost: boolean;
  boostStuck: boolean;
  boostStuckKpa: number;
  turboSpeedStuck: boolean;
  turboSpeedStuckRpm: number;
  /** Whole milliseconds each activation of the guard starts late. */
  guardDelay: number;
  /** Whole milliseconds between activations of the guard, when longer than its step. */
  guardPeriod: number;
}

export function newLoopFaults(): LoopFaults {
  return {
    boostLost: false,
    turboSpeedLost: false,
    boostStuck: false,
    boostStuckKpa: 0.5,
    turboSpeedStuck: false,
    turboSpeedStuckRpm: 0.5,
    guardDelay: 0,
    guardPeriod: 0,
  };
}

type Values = FixedFault["values"];
interface FaultKind {
  /** Names of the `values` it reads, with their units; a stuck sensor's may be absent. */
  readonly fields: Readonly<Record<string, string>>;
  readonly apply: (values: Values, loop: LoopFaults, plant: PlantFaults) => void;
}

/** Every kind of fault the loop knows: what it needs and what it does while in force. */
export const FAULT_KINDS = {
  boost_pressure_stuck: {
    fields: { value: "kPa abs" },
    apply: (values, loop) => {
      loop.boostStuck = true;
      loop.boostStuckKpa = values.value ?? Number.NaN;
    },
  },
  turbo_speed_stuck: {
    fields: { value: "rpm" },
    apply: (values, loop) => {
      loop.turboSpeedStuck = true;
      loop.turboSpeedStuckRpm = values.value ?? Number.NaN;
    },
  },
  boost_pressure_lost: {
    fields: {},
    apply: (_values, loop) => {
      loop.boostLost = true;
    },
  },
  turbo_speed_lost: {
    fields: {},
    apply: (_values, loop) => {
      loop.turboSpeedLost = true;
    },
  },
  boost_leak: {
    fields: { area: "m2" },
    apply: (values, _loop, plant) => {
      plant.boostLeakArea += values.area;
    },
  },
  exhaust_leak: {
    fields: { area: "m2" },
    apply: (values, _loop, plant) => {
      plant.exhaustLeakArea += values.area;
    },
  },
  clogged_filter: {
    fields: { factor: "1" },
    apply: (values, _loop, plant) => {
      plant.airFilterFactor *= values.factor;
    },
  },
  turbine_efficiency: {
    fields: { factor: "1" },
    apply: (values, _loop, plant) => {
      plant.turbineEfficiencyFactor *= values.factor;
    },
  },
  guard_task_delayed: {
    fields: { by: "s" },
    apply: (values, loop) => {
      loop.guardDelay += wholeMilliseconds(values.by);
    },
  },
  guard_task_every: {
    fields: { period: "s" },
    apply: (values, loop) => {
      loop.guardPeriod = Math.max(loop.guardPeriod, wholeMilliseconds(values.period));
    },
  },
  wastegate_stuck: {
    fields: {},
    apply: (_values, _loop, plant) => {
      plant.wastegateHealth = 0;
    },
  },
  /** Free rate divided and servo lag multiplied by `factor`. */
  wastegate_slow: {
    fields: { factor: "1" },
    apply: (values, _loop, plant) => {
      plant.wastegateHealth /= values.factor;
    },
  },
} as const satisfies Record<string, FaultKind>;
export type FaultKindName = keyof typeof FAULT_KINDS;

/** Sets what is in force at `time` seconds; throws on a kind that is not in the table. */
export function applyFaults(
  faults: readonly FixedFault[],
  time: number,
  loop: LoopFaults,
  plant: PlantFaults,
): void {
  Object.assign(loop, newLoopFaults());
  clearPlantFaults(plant);
  for (const fault of faults) {
    const kind: FaultKind | undefined = FAULT_KINDS[fault.kind as FaultKindName];
    if (kind === undefined) throw new Error(`no fault is called \`${fault.kind}\``);
    if (time >= fault.from && time < fault.from + fault.lasting) kind.apply(fault.values, loop, plant);
  }
}

function clearPlantFaults(plant: PlantFaults): void {
  plant.boostLeakArea = 0;
  plant.exhaustLeakArea = 0;
  plant.airFilterFactor = 1;
  plant.turbineEfficiencyFactor = 1;
  plant.wastegateHealth = 1;
}
