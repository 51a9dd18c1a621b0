import { block, integer, optional, path, required, shape } from "./build.ts";
import { CONTROLLER_BLOCK } from "./controller-table.ts";
import { PLANT_BLOCK } from "./plant-table.ts";
import { REQUIREMENTS } from "./requirement-table.ts";
import { SCENARIOS } from "./scenario-table.ts";

/** Version of the language, first line of every file. */
const version = required(integer(1, 1), "version of the language", "1");

/** A loop spec: the whole file. */
export const LOOP_FILE = block({
  spoolwright: version,
  controller: required(CONTROLLER_BLOCK, "the boost loop", "{ name: boost, step: 5 ms }"),
  plant: optional(
    shape({ scalar: path, map: PLANT_BLOCK }),
    "the engine it is tested on: inline, or a plant file beside this one",
    "./engine.plant.yaml",
  ),
  scenarios: optional(SCENARIOS, "manoeuvres, by name", "{ tip_in: { duration: 6 s } }"),
  requirements: optional(
    REQUIREMENTS,
    "what must hold",
    "[{ id: overspeed, says: the turbo stays below its limit }]",
  ),
});

/** A plant file. */
export const PLANT_FILE = block({
  spoolwright: version,
  plant: required(PLANT_BLOCK, "the engine", "{ name: skarn24 }"),
});
