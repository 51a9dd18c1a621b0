import { type DrawnScenario, FAULT_KINDS, type FixedCourse, type FixedFault } from "../hil-sim/index.ts";
import type { Course, FaultSpec, Free, ScenarioSpec } from "../spec/index.ts";

/** A place in a scenario that takes a number: its name in counterexamples, and its range. */
export interface FreeValue {
  readonly name: string;
  readonly free: Free;
  readonly base: BaseUnit;
}

/** What the numbers of a place are in: the base units of spec, traces and faults. */
export type BaseUnit = "s" | "rpm" | "kPa abs" | "K" | "m" | "m2" | "ratio";

export type Pick = (value: FreeValue) => number;

/** What a run may leave out of its scenario: noise, faults, and the end. */
export interface Reductions {
  /** Multiplies the scenario's sensor noise. */
  readonly noise: number;
  /** One per fault of the scenario: kept or not. */
  readonly faults: readonly boolean[];
  /** Seconds, at most; absent: as long as the scenario says. */
  readonly duration?: number;
}

/** The scenario with a number in each place, asked of `pick` in a fixed order. */
export function fixScenario(
  scenario: ScenarioSpec,
  pick: Pick,
  reductions: Reductions,
  noiseSeed: number,
): DrawnScenario {
  const { ambient, engineSpeed, target } = scenario;
  const duration = pick({ name: "duration", free: scenario.duration, base: "s" });
  return {
    name: scenario.name,
    duration: Math.min(duration, reductions.duration ?? duration),
    engineSpeed:
      engineSpeed.kind === "imposed"
        ? { kind: "imposed", course: fixCourse("engine_speed", engineSpeed.course, "rpm", pick) }
        : { kind: "vehicle", fromRpm: pick({ name: "engine_speed", free: engineSpeed.from, base: "rpm" }) },
    accelerator: fixCourse("accelerator", scenario.accelerator, "ratio", pick),
    ...(target && { target: fixCourse("target", target, "kPa abs", pick) }),
    ceilings: scenario.ceilings,
    ambient: {
      temperature: pick({ name: "ambient.temperature", free: ambient.temperature, base: "K" }),
      altitude: pick({ name: "ambient.altitude", free: ambient.altitude, base: "m" }),
    },
    sensorNoise: scenario.sensorNoise * reductions.noise,
    faults: scenario.faults
      .map((fault, index) => fixFault(`faults[${index}]`, fault, pick))
      .filter((_, index) => reductions.faults[index]),
    noiseSeed,
  };
}

/** Every place of a scenario that is drawn, in the order in which `fixScenario` asks. */
export function freeValues(scenario: ScenarioSpec): FreeValue[] {
  const found: FreeValue[] = [];
  const all = scenario.faults.map(() => true);
  const note: Pick = (value) => {
    if (value.free.low !== value.free.high) found.push(value);
    return value.free.low;
  };
  fixScenario(scenario, note, { noise: 1, faults: all }, 0);
  return found;
}

function fixCourse(name: string, course: Course, base: BaseUnit, pick: Pick): FixedCourse {
  const single = course.length === 1;
  return course.map((point, index) => {
    const place = single ? name : `${name}[${index}]`;
    return {
      at: pick({ name: `${place}.at`, free: point.at, base: "s" }),
      value: pick({ name: single ? name : `${place}.value`, free: point.value, base }),
      over: pick({ name: `${place}.over`, free: point.over, base: "s" }),
    };
  });
}

function fixFault(name: string, fault: FaultSpec, pick: Pick): FixedFault {
  const from = pick({ name: `${name}.at`, free: fault.from, base: "s" });
  const lasting = fault.lasting
    ? pick({ name: `${name}.for`, free: fault.lasting, base: "s" })
    : Number.POSITIVE_INFINITY;
  const values: Record<string, number> = {};
  for (const [key, free] of Object.entries(fault.values)) {
    values[key] = pick({ name: `${name}.${key}`, free, base: faultUnit(fault.kind, key) });
  }
  return { kind: fault.kind, from, lasting, values };
}

/** The unit that hil-sim takes a fault's field in; a plain factor is a ratio. */
function faultUnit(kind: string, field: string): BaseUnit {
  const kinds: Readonly<Record<string, { readonly fields: Readonly<Record<string, string>> }>> = FAULT_KINDS;
  const unit = kinds[kind]?.fields[field];
  return unit === undefined || unit === "1" ? "ratio" : (unit as BaseUnit);
}
