import type { DrawnScenario, FixedCourse } from "../../hil-sim/drawn-scenario.ts";
import type { LoopPlant } from "../../hil-sim/loop/run-loop.ts";
import { plantParameters } from "../../hil-sim/plant/plant-parameters.ts";
import type { PlantSpec } from "../../spec/plant-spec.ts";

export const held = (value: number): FixedCourse => [{ at: 0, value, over: 0 }];

/** A steady pull at 5000 rpm with 200 kPa wanted, no noise, no faults. */
export function pull(change: Partial<DrawnScenario> = {}): DrawnScenario {
  return {
    name: "pull",
    duration: 2,
    engineSpeed: { kind: "imposed", course: held(5000) },
    accelerator: held(1),
    target: held(200),
    ceilings: true,
    ambient: { temperature: 298, altitude: 0 },
    sensorNoise: 0,
    faults: [],
    noiseSeed: 1,
    ...change,
  };
}

export function plantOf(spec: PlantSpec): LoopPlant {
  return { parameters: plantParameters(spec), sensors: spec.sensors, validity: spec.validity };
}
