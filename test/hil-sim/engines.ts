import { readFileSync } from "node:fs";
import { type PlantSpec, readPlant } from "../../spec/index.ts";

function readEngine(name: string): PlantSpec {
  const file = `examples/${name}/${name}.plant.yaml`;
  const text = readFileSync(new URL(`../../${file}`, import.meta.url), "utf8");
  const { plant, diagnostics } = readPlant({ file, text });
  if (plant === undefined) throw new Error(diagnostics.map(({ message }) => message).join("; "));
  return plant;
}

/** The invented four-cylinder and the invented V6 of the example plant files. */
export const engineA = readEngine("skarn24");
export const engineB = readEngine("skarn30");
