import type { FaultSpec, Free, ScenarioSpec } from "../../spec/scenario-spec.ts";
import { NOWHERE } from "./traces.ts";

export const free = (low: number, high = low, unit = "1"): Free => ({ low, high, unit, at: NOWHERE });

export const point = (at: Free, value: Free, over = free(0)) => ({ at, value, over });

/** A scenario with nothing free; fields can be replaced. */
export function scenario(changes: Partial<ScenarioSpec> = {}): ScenarioSpec {
  return {
    name: "steps",
    duration: free(5),
    engineSpeed: { kind: "imposed", course: [point(free(0), free(5000))] },
    accelerator: [point(free(0), free(1))],
    ceilings: true,
    ambient: { temperature: free(298.15), altitude: free(0) },
    plantScatter: { kind: "none" },
    sensorNoise: 1,
    faults: [],
    at: NOWHERE,
    ...changes,
  };
}

export const fault = (changes: Partial<FaultSpec> = {}): FaultSpec => ({
  kind: "boost_leak",
  from: free(1),
  values: { area: free(3e-4) },
  at: NOWHERE,
  ...changes,
});
