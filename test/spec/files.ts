import { readFileSync } from "node:fs";
import type { OpenNeighbour, Source } from "../../spec/index.ts";

const FILES = new URL("./files/", import.meta.url);

export const testFile = (name: string): Source => ({
  file: name,
  text: readFileSync(new URL(name, FILES), "utf8"),
});

/** Opens the plant beside the test specs. */
export const openTestFile: OpenNeighbour = (path) =>
  path === "./engine.plant.yaml" ? testFile("engine.plant.yaml") : undefined;

/** The smallest loop spec that is accepted. */
export const SMALLEST = `spoolwright: 1
controller:
  name: boost
  step: 5 ms
  signals:
    engine_speed: { range: 0 rpm to 9000 rpm }
    accelerator: { range: 0 % to 100 % }
    boost_pressure: { range: 20 kPa abs to 350 kPa abs }
    ambient_pressure: { range: 50 kPa abs to 110 kPa abs }
  target:
    boost:
      rows: { accelerator: [0, 100], unit: "%" }
      columns: { engine_speed: [2000, 6000], unit: rpm }
      unit: kPa abs
      values: [[100, 100], [180, 200]]
    ceiling: 245 kPa abs
    slew: { rise: 900 kPa/s, fall: 1500 kPa/s }
  feedback:
    coordinate: opening
    schedule: constant
    proportional: 0.4 %/kPa
    integral: 1 %/kPa/s
    trim_limits: -20 % to 20 %
    anti_windup: { method: conditional, band: 10 kPa, still_below: 15 kPa/s }
  actuator: { slew: { open: 900 %/s, close: 500 %/s } }
`;
