import type { Course, FaultSpec, Free, ScenarioSpec } from "../scenario-spec.ts";
import type { Span } from "../span.ts";
import type { Value } from "../table/kind.ts";
import type { SCENARIO_BLOCK, SCENARIOS } from "../table/scenario-table.ts";
import { defined } from "./defined.ts";

type Scenario = Value<typeof SCENARIO_BLOCK, "whole">;
type Points = Exclude<Scenario["accelerator"], Free>;

const fixed = (value: number, unit: string, at: Span): Free => ({ low: value, high: value, unit, at });

/** A held value is a course of one point. */
function courseOf(read: Free | Points): Course {
  if (!("low" in read)) return read.map(({ at, value, over }) => ({ at, value, over }));
  return [{ at: fixed(0, "s", read.at), value: read, over: fixed(0, "s", read.at) }];
}

function engineSpeedOf(read: Scenario["engineSpeed"]): ScenarioSpec["engineSpeed"] {
  if ("vehicleFrom" in read) return { kind: "vehicle", from: read.vehicleFrom };
  return { kind: "imposed", course: courseOf(read) };
}

function scatterOf(read: Scenario["plantScatter"]): ScenarioSpec["plantScatter"] {
  if (read === "none") return { kind: "none" };
  return read === "default" ? { kind: "set", name: read } : { kind: "uniform", ratio: read.value };
}

function noiseOf(read: Scenario["sensorNoise"]): number {
  if (typeof read !== "string") return read.value;
  return read === "none" ? 0 : 1;
}

type Fault = Exclude<Scenario["faults"], "none">[number];

/** The kind's own fields are what is left without those that every fault has. */
function faultOf({ kind, at, for: lasting, span, places: _places, ...values }: Fault): FaultSpec {
  return { kind, from: at, ...defined({ lasting }), values: defined(values), at: span };
}

export function assembleScenarios(read: Value<typeof SCENARIOS, "whole">): readonly ScenarioSpec[] {
  return read.map(({ name, value, nameAt }) => ({
    name,
    duration: value.duration,
    engineSpeed: engineSpeedOf(value.engineSpeed),
    accelerator: courseOf(value.accelerator),
    ...defined({ target: value.target && courseOf(value.target) }),
    ceilings: value.ceilings === "on",
    ambient: { temperature: value.ambient.temperature, altitude: value.ambient.altitude },
    plantScatter: scatterOf(value.plantScatter),
    sensorNoise: noiseOf(value.sensorNoise),
    faults: value.faults === "none" ? [] : value.faults.map(faultOf),
    at: nameAt,
  }));
}
